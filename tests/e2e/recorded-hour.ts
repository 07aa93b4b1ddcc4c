import { readdirSync, readFileSync, readlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { expect, type Page } from '@playwright/test';
import { seeded } from '../../src/lib/analysis/random/seeded';
import { cellsOfDay } from '../../src/demo/simulate/population';
import { recordRun } from '../../src/demo/simulate/recording';
import { runOpen } from '../../src/demo/simulate/run-open';
import { field, panel } from './fields';
import { TAG } from './names';
import { test, visit } from './people';
import { makeToken } from './shell';

const MINUTES = 60;
const UNITS = 120;
/** The demo lab's open arena. */
const BOX = { name: 'rectangle:100x80', widthCm: 100, heightCm: 80 };
const LEAST_BYTES = 100e6;
const MOST_RSS_MIB = 400;
const PANEL_S = 30;
const ANSWER_S = 2;

/** Cells of the demo lab's simulation, made to fire so often that the table reaches its size. */
function hour(folder: string) {
	const story = {
		seed: 5,
		bundles: Array.from({ length: 16 }, (_, b) => `T${String(b + 1).padStart(2, '0')}`),
		cellsPerBundle: Array.from({ length: 16 }, (_, b) => (b < 8 ? 8 : 7)),
		days: 1,
		turnover: 0,
		fieldDriftCm: 0,
		silentFrom: {}
	};
	const cells = cellsOfDay(story, 0, BOX).map((cell) => ({ ...cell, baseHz: cell.baseHz + 11 }));
	expect(cells).toHaveLength(UNITS);
	const path = runOpen(BOX.widthCm, BOX.heightCm, MINUTES * 60, seeded(5, 'path'));
	const { positionCsv, spikesCsv } = recordRun(path, cells, 5, { xCm: 0, yCm: 0 });
	writeFileSync(join(folder, 'position.csv'), positionCsv);
	writeFileSync(join(folder, 'spikes.csv'), spikesCsv);
	return spikesCsv.length;
}

/** The process that listens on the lab's port, found as the system knows it. */
function serverOf(port: number): string {
	const listens = readFileSync('/proc/net/tcp', 'utf8') + readFileSync('/proc/net/tcp6', 'utf8');
	const hex = port.toString(16).toUpperCase().padStart(4, '0');
	const line = listens.split('\n').find((text) => new RegExp(`:${hex} \\S+ 0A `).test(text));
	const socket = `socket:[${line?.trim().split(/\s+/)[9]}]`;
	for (const pid of readdirSync('/proc').filter((name) => /^\d+$/.test(name))) {
		try {
			const files = readdirSync(`/proc/${pid}/fd`);
			if (files.some((fd) => linkOf(`/proc/${pid}/fd/${fd}`) === socket)) return pid;
		} catch {
			// Ended meanwhile, or another user's.
		}
	}
	throw new Error(`Nothing listens on ${port}.`);
}

function linkOf(path: string): string {
	try {
		return readlinkSync(path);
	} catch {
		return '';
	}
}

const peakMiB = (pid: string) =>
	Number(/VmHWM:\s+(\d+)/.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))?.[1]) / 1024;

/** Asks for a page twice a second until told to stop. @returns the slowest answer, s */
async function slowestAnswer(page: Page, signal: AbortSignal): Promise<number> {
	let slowest = 0;
	while (!signal.aborted) {
		const begun = performance.now();
		expect((await page.request.get('/animals')).status()).toBe(200);
		slowest = Math.max(slowest, (performance.now() - begun) / 1000);
		await sleep(500);
	}
	return slowest;
}

test('an hour of 120 units, 100 MB of spikes, is a panel in half a minute', async ({
	open,
	request,
	baseURL
}, testInfo) => {
	test.setTimeout(600_000);
	const folder = testInfo.outputPath();
	const bytes = hour(folder);
	expect(bytes).toBeGreaterThan(LEAST_BYTES);

	const headers = { authorization: `Bearer ${await makeToken('write')}` };
	const code = `HOUR${TAG}`;
	const animal = { code, species: 'rat', sex: 'unknown', note: 'Simulated.' };
	await request.post('/api/v1/animals', { headers, data: animal });
	const made = await request.post(`/api/v1/animals/${code}/sessions`, {
		headers,
		data: { startsAt: '2026-03-02T10:00:00Z', arena: BOX.name }
	});
	expect(made.status(), await made.text()).toBe(201);
	const { id } = (await made.json()) as { id: string };

	const page = await open({ role: 'experimenter' });
	await visit(page, `/animals/${code}/sessions/${id}`);
	const server = serverOf(Number(new URL(baseURL ?? '').port));
	const stop = new AbortController();
	const answers = slowestAnswer(page, stop.signal);
	const seconds: Record<string, number> = {};
	let begun = performance.now();
	const lap = (name: string) => {
		seconds[name] = (performance.now() - begun) / 1000;
		begun = performance.now();
	};
	for (const name of ['position.csv', 'spikes.csv']) {
		await field(page, 'Files').setInputFiles(join(folder, name));
		const file = page.getByRole('article', { name });
		await expect(file).toContainText('waits for you', { timeout: 120_000 });
		lap(`${name} sent`);
		await file.getByRole('button', { name: 'take it in' }).click();
		if (name === 'position.csv') await expect(file).toContainText('taken in');
		lap(`${name} taken in`);
	}
	await expect(panel(page, 'Where the cells say it is')).toBeVisible({ timeout: 180_000 });
	lap('panel');
	stop.abort();
	const slowestS = await answers;
	const rssMiB = peakMiB(server);
	const told = Object.entries(seconds).map(([what, s]) => `${what} ${s.toFixed(1)} s`);
	console.log(
		`${(bytes / 1e6).toFixed(0)} MB; ${told.join('; ')}; server at most ${rssMiB.toFixed(0)} MiB; slowest other answer ${slowestS.toFixed(2)} s`
	);
	expect(seconds.panel).toBeLessThan(PANEL_S);
	expect(rssMiB).toBeLessThan(MOST_RSS_MIB);
	expect(slowestS).toBeLessThan(ANSWER_S);
});
