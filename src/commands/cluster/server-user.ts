import { execFileSync, spawnSync } from 'node:child_process';
import { statSync } from 'node:fs';
import { findProgram } from '../machine/debian';

/** Who runs the database server; undefined means the person who started us. */
export interface ServerUser {
	uid: number;
	gid: number;
}

/**
 * PostgreSQL refuses to run as root, so root lends it another user: the one that owns the
 * data already, else the package's `postgres`, else a system user of our own.
 */
export function serverUser(dataFolder: string): ServerUser | undefined {
	if (process.getuid?.() !== 0) return undefined;
	const owner = statSync(dataFolder, { throwIfNoEntry: false });
	if (owner && owner.uid !== 0) return { uid: owner.uid, gid: owner.gid };
	return userNamed('postgres') ?? userNamed('quarterturn') ?? makeUser('quarterturn');
}

function userNamed(name: string): ServerUser | undefined {
	const ask = (flag: string) => spawnSync('id', [flag, name], { encoding: 'utf8' });
	const uid = ask('-u');
	return uid.status === 0 ? { uid: Number(uid.stdout), gid: Number(ask('-g').stdout) } : undefined;
}

function makeUser(name: string): ServerUser {
	execFileSync(findProgram('useradd') ?? 'useradd', [
		'--system',
		'--user-group',
		'--no-create-home',
		'--shell',
		'/usr/sbin/nologin',
		name
	]);
	const made = userNamed(name);
	if (!made) throw new Error(`useradd ended well but there is no user ${name}`);
	return made;
}
