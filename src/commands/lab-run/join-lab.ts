import { setTimeout as sleep } from 'node:timers/promises';
import { holderOf, tryLock } from '../bootstrap/lock.mjs';
import { clusterUrls } from '../cluster/cluster';
import { knownPlace } from '../cluster/place';
import { openHome, type Home } from '../home/home';
import { secretsOf } from '../home/secrets';
import { say } from '../machine/say';
import { bringUpToDate, openDatabase } from './database';

/**
 * Gives this process the settings of the lab on this machine: of the database named in the
 * settings, of the lab that runs on this home now, or of its cluster, started for the time being.
 * @returns what to call when done
 */
export async function joinLab(): Promise<() => Promise<void>> {
	const home = openHome();
	process.env.SECRET_KEY ||= secretsOf(home).secretKey;
	if (process.env.DATABASE_URL) return async () => undefined;

	let hasSaid = false;
	for (;;) {
		const lock = tryLock(home.file('running.json'), { command: 'lab' });
		if ('release' in lock) return startAlone(home, lock.release);
		const address = holderOf(home.file('running.json'))?.note.address;
		const port = knownPlace(home)?.port;
		if (address && port) {
			process.env.DATABASE_URL = clusterUrls(home, port).appUrl;
			process.env.ORIGIN ||= address;
			return async () => undefined;
		}
		if (!hasSaid) say('The lab is just starting; waiting for it …');
		hasSaid = true;
		await sleep(500);
	}
}

async function startAlone(home: Home, release: () => void): Promise<() => Promise<void>> {
	try {
		const database = await openDatabase(home, false);
		try {
			await bringUpToDate(home, database);
			process.env.DATABASE_URL = database.appUrl;
			return async () => {
				await database.stop();
				release();
			};
		} catch (error) {
			await database.stop();
			throw error;
		}
	} catch (error) {
		release();
		throw error;
	}
}
