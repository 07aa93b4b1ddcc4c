import { spawnSync } from 'node:child_process';
import {
	chmodSync,
	chownSync,
	existsSync,
	mkdirSync,
	readFileSync,
	renameSync,
	writeFileSync
} from 'node:fs';
import { join } from 'node:path';
import { Refusal } from '../bootstrap/refusal.mjs';
import type { Home } from '../home/home';
import type { ServerUser } from './server-user';

/** Where a lab's cluster lies and which port it answers on; kept in the home. */
export interface Place {
	folder: string;
	port: number | undefined;
}

const NOTE = 'cluster.json';

export function knownPlace(home: Home): Place | undefined {
	const file = home.file(NOTE);
	if (!existsSync(file)) return undefined;
	const { folder, port } = JSON.parse(readFileSync(file, 'utf8')) as Place;
	if (!existsSync(folder)) {
		// Silently making an empty one would look like the loss of the whole record.
		throw new Refusal(
			`The database of this lab was in ${folder}, and that folder is gone. Nothing was changed. Put it back; or, to begin with an empty database, move ${file} away.`
		);
	}
	return { folder, port };
}

export function keepPlace(home: Home, place: Place): void {
	const file = home.file(NOTE);
	writeFileSync(`${file}.${process.pid}`, `${JSON.stringify(place)}\n`);
	renameSync(`${file}.${process.pid}`, file);
}

/**
 * A folder the server's user can reach. The home is tried first; a checkout below a
 * closed folder such as /root needs one below /var/lib, named for the home.
 */
export function findPlace(home: Home, user: ServerUser | undefined): string {
	const tried = user
		? [home.file('postgres'), `/var/lib/quarterturn-${home.hash}`]
		: [home.file('postgres')];
	for (const folder of tried) {
		mkdirSync(folder, { recursive: true });
		chmodSync(folder, 0o700);
		if (user) chownSync(folder, user.uid, user.gid);
		if (canUse(folder, user)) return folder;
	}
	throw new Refusal(
		`The database's user (id ${user?.uid ?? process.getuid?.()}) can write neither of ${tried.join(' and ')}. Nothing was changed. Set QUARTERTURN_HOME to a folder it can reach.`
	);
}

function canUse(folder: string, user: ServerUser | undefined): boolean {
	const probe = join(folder, '.probe');
	const script = ': > "$1" && rm "$1"';
	const ran = spawnSync('/bin/sh', ['-c', script, 'sh', probe], {
		...user,
		cwd: '/',
		stdio: 'ignore'
	});
	return ran.status === 0;
}
