import { chownSync, existsSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { runProgram } from '../machine/run-program';
import { say } from '../machine/say';
import type { PostgresPrograms } from './programs';
import type { ServerUser } from './server-user';

export const SUPERUSER = 'quarterturn_super';

export function dataFolder(place: string): string {
	return join(place, 'data');
}

/** The version that made the cluster, or undefined when there is none yet. */
export function clusterMajor(place: string): number | undefined {
	const file = join(dataFolder(place), 'PG_VERSION');
	return existsSync(file) ? Number(readFileSync(file, 'utf8')) : undefined;
}

/**
 * Makes the data folder under another name and renames it when it is whole, so that a
 * folder called `data` was never half made. What an interrupted run left can hold no records
 * (no server ever ran on it) and goes; a `data` that is no cluster is moved aside, not deleted.
 */
export async function ensureData(
	place: string,
	programs: PostgresPrograms,
	user: ServerUser | undefined,
	password: string,
	isThrowAway: boolean
): Promise<void> {
	if (clusterMajor(place)) return;
	if (existsSync(dataFolder(place))) {
		const aside = join(place, `data-unreadable-${Date.now()}`);
		renameSync(dataFolder(place), aside);
		say(`${dataFolder(place)} is not a database; it was moved to ${aside}.`);
	}
	const making = join(place, 'making');
	rmSync(making, { recursive: true, force: true });

	const passwordFile = join(place, 'password');
	writeFileSync(passwordFile, password, { mode: 0o600 });
	if (user) chownSync(passwordFile, user.uid, user.gid);
	try {
		const { code, words } = await runProgram(
			[
				programs.program('initdb'),
				`--pgdata=${making}`,
				`--username=${SUPERUSER}`,
				`--pwfile=${passwordFile}`,
				'--auth=scram-sha-256',
				'--encoding=UTF8',
				'--locale=C.UTF-8',
				...(isThrowAway ? ['--no-sync'] : [])
			],
			{ ...user, cwd: place }
		);
		if (code !== 0) throw new Error(`initdb failed (exit ${code}): ${words}`);
	} finally {
		rmSync(passwordFile, { force: true });
	}
	renameSync(making, dataFolder(place));
}
