import {
	chmodSync,
	existsSync,
	mkdirSync,
	readdirSync,
	renameSync,
	rmSync,
	writeFileSync
} from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { openCluster, type Cluster } from '../../../src/commands/cluster/cluster';
import { knownPlace } from '../../../src/commands/cluster/place';
import { withClient } from '../../../src/commands/cluster/roles';
import { makeThrowAwayHome, removeHome } from '../../../src/commands/cluster/throw-away';
import type { Home } from '../../../src/commands/home/home';

// Each case makes a cluster or two, a second apiece on a quiet machine.
vi.setConfig({ testTimeout: 90_000 });

let home: Home;
let cluster: Cluster | undefined;

beforeEach(() => {
	home = makeThrowAwayHome('cluster-test');
});
afterEach(async () => {
	await cluster?.stop();
	cluster = undefined;
	removeHome(home);
});

async function open(): Promise<Cluster> {
	cluster = await openCluster(home, true);
	return cluster;
}

async function close(): Promise<void> {
	await cluster?.stop();
	cluster = undefined;
}

const note = (url: string) =>
	withClient(url, (c) => c.query('CREATE TABLE IF NOT EXISTS kept (x int)'));
const isKept = (url: string) =>
	withClient(url, async (c) => {
		const { rows } = await c.query("SELECT to_regclass('kept') IS NOT NULL AS found");
		return rows[0].found as boolean;
	});

function place(): string {
	const known = knownPlace(home);
	if (!known) throw new Error('no cluster yet');
	return known.folder;
}

describe('the private cluster', () => {
	it('keeps its data and its port from one start to the next', async () => {
		const first = await open();
		await note(first.ownerUrl);
		await close();
		const second = await open();
		expect(await isKept(second.ownerUrl)).toBe(true);
		expect(new URL(second.appUrl).port).toBe(new URL(first.appUrl).port);
	});

	it('makes itself anew when the first making was interrupted', async () => {
		mkdirSync(home.file('postgres/making/base'), { recursive: true });
		writeFileSync(home.file('postgres/making/PG_VERSION'), '15\n');
		await open();
		expect(readdirSync(place())).not.toContain('making');
	});

	it('moves a data folder that is no database aside and keeps what is in it', async () => {
		mkdirSync(home.file('postgres/data'), { recursive: true });
		writeFileSync(home.file('postgres/data/thesis.txt'), 'mine');
		await open();
		const aside = readdirSync(place()).find((name) => name.startsWith('data-unreadable-'));
		expect(existsSync(join(place(), aside ?? '', 'thesis.txt'))).toBe(true);
	});

	it('starts over a note of a server that is gone', async () => {
		await note((await open()).ownerUrl);
		await close();
		writeFileSync(
			join(place(), 'data/postmaster.pid'),
			`${process.pid}\n/x\n1\n5432\n\n\n\nready\n`
		);
		expect(await isKept((await open()).ownerUrl)).toBe(true);
	});

	it('comes back by itself, with all that was committed, when its server is killed', async () => {
		cluster = await openCluster(home);
		const { ownerUrl } = cluster;
		await note(ownerUrl);
		cluster.kill();
		await vi.waitFor(async () => expect(await isKept(ownerUrl)).toBe(true), 60_000);
	});

	it('takes another port when its own is in use', async () => {
		const port = Number(new URL((await open()).appUrl).port);
		await close();
		const intruder = createServer();
		await new Promise<void>((done) => intruder.listen(port, '127.0.0.1', done));
		try {
			expect(Number(new URL((await open()).appUrl).port)).not.toBe(port);
		} finally {
			intruder.close();
		}
	});

	it('opens with new passwords when its secrets were lost', async () => {
		await note((await open()).ownerUrl);
		await close();
		rmSync(home.file('secrets.json'));
		expect(await isKept((await open()).ownerUrl)).toBe(true);
	});

	it('refuses to begin an empty database where one was and is gone', async () => {
		await open();
		await close();
		const away = `${place()}-away`;
		renameSync(place(), away);
		await expect(open()).rejects.toThrow(/that folder is gone. Nothing was changed/);
		renameSync(away, home.file('postgres'));
	});

	it.runIf(process.getuid?.() === 0)(
		'goes below /var/lib when the home is closed to the database user',
		async () => {
			chmodSync(home.folder, 0o700);
			await open();
			expect(place()).toBe(`/var/lib/quarterturn-${home.hash}`);
		}
	);
});
