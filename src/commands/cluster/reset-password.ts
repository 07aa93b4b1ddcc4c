import { spawnSync } from 'node:child_process';
import { Refusal } from '../bootstrap/refusal.mjs';
import { dataFolder, SUPERUSER } from './data-folder';
import type { ServerUser } from './server-user';

/**
 * Gives the superuser a new password through PostgreSQL's single-user mode, which asks for
 * none: whoever owns the files owns the database. Needed when the home's secrets were lost
 * or put back from another copy. The server must be stopped.
 */
export function resetSuperuserPassword(
	program: string,
	place: string,
	user: ServerUser | undefined,
	password: string
): void {
	const ran = spawnSync(program, ['--single', '-D', dataFolder(place), 'postgres'], {
		...user,
		cwd: place,
		input: `ALTER ROLE ${SUPERUSER} PASSWORD '${password}'\n`,
		encoding: 'utf8'
	});
	if (ran.status !== 0) {
		throw new Refusal(
			`The database in ${place} does not know the password kept in the home, and setting it anew failed: ${ran.stderr.trim()}. Its data were left as they are. Put secrets.json back from a copy.`
		);
	}
}
