import { existsSync, rmSync, writeFileSync } from 'node:fs';
import { migrate, pending } from '$lib/server/migrations/migrate';
import { Refusal } from '../bootstrap/refusal.mjs';
import { openCluster } from '../cluster/cluster';
import { DATABASE, createDatabase, withClient } from '../cluster/roles';
import type { Home } from '../home/home';
import { say } from '../machine/say';
import { backUp, isEmpty } from './backup';

export interface LabDatabase {
	ownerUrl: string;
	appUrl: string;
	/** Rejects when our own server is gone for good; never for a database of somebody else's. */
	failed: Promise<never>;
	stop(): Promise<void>;
	kill(): void;
	/** Empties our own database; undefined where it is not ours to empty. */
	empty?: () => Promise<void>;
}

/** The database of the settings, or else the home's own cluster, started. */
export async function openDatabase(home: Home, isThrowAway: boolean): Promise<LabDatabase> {
	const given = process.env.DATABASE_URL;
	if (given) {
		return {
			ownerUrl: process.env.DATABASE_OWNER_URL || given,
			appUrl: given,
			failed: new Promise<never>(() => undefined),
			stop: async () => undefined,
			kill: () => undefined
		};
	}
	const cluster = await openCluster(home, isThrowAway);
	return {
		...cluster,
		empty: () =>
			withClient(cluster.superUrl, async (client) => {
				await client.query(`DROP DATABASE IF EXISTS ${DATABASE} WITH (FORCE)`);
				await createDatabase(client, DATABASE);
			})
	};
}

/** Brings the schema up to date, after a backup when there is anything to lose. */
export async function bringUpToDate(home: Home, database: LabDatabase): Promise<void> {
	const waiting = await pending(database.ownerUrl);
	if (waiting.length > 0 && !(await isEmpty(database.ownerUrl))) {
		const file = await backUp(home, database.ownerUrl, `before-${waiting[0]}`);
		say(`Updating the database (${waiting.join(', ')}); a backup from before is ${file}`);
	}
	await migrate(database.ownerUrl);
}

const FILLING = 'filling';

/**
 * Empties a database whose filling with the demo lab was cut off. Until that was whole no page
 * was served, so it holds nobody's work.
 */
export async function discardHalfFilled(home: Home, database: LabDatabase): Promise<void> {
	const mark = home.file(FILLING);
	if (!existsSync(mark)) return;
	if (!database.empty) {
		throw new Refusal(
			`Filling the demo lab was cut off earlier, and ${mark} says so. The database is not ours to empty: hand over an empty one, remove that file, and start again.`
		);
	}
	say('Filling the demo lab was cut off earlier; the database is made anew.');
	await database.empty();
	rmSync(mark);
}

/** Runs `fill` when the database is empty. */
export async function fillOnce(
	home: Home,
	database: LabDatabase,
	fill: () => Promise<void>
): Promise<void> {
	if (!(await isEmpty(database.ownerUrl))) return;
	writeFileSync(home.file(FILLING), '');
	await fill();
	rmSync(home.file(FILLING));
}
