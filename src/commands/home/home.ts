import { createHash } from 'node:crypto';
import { accessSync, chmodSync, constants, existsSync, mkdirSync, statSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Refusal } from '../bootstrap/refusal.mjs';

/** The checkout these commands belong to. */
export const CHECKOUT = fileURLToPath(new URL('../../..', import.meta.url)).replace(/\/$/, '');

/** The folder of one lab on this machine: cluster, secrets, backups, logs, caught mail. */
export interface Home {
	folder: string;
	/** A short name for things kept elsewhere on its behalf. */
	hash: string;
	file(...parts: string[]): string;
	/** Where the words of one of its programs are kept; readable by this user alone. */
	logFile(program: string): string;
}

export function homeFolder(env: NodeJS.ProcessEnv = process.env): string {
	return resolve(CHECKOUT, env.QUARTERTURN_HOME || '.quarterturn');
}

/** Makes the folder when needed. Others may pass through it (the database's user must) but not list it. */
export function openHome(folder: string = homeFolder()): Home {
	const isNew = !existsSync(folder);
	mkdirSync(folder, { recursive: true });
	if (isNew) chmodSync(folder, 0o711);
	if (!isWritable(folder)) {
		throw new Refusal(
			`The folder ${folder} belongs to another user (id ${statSync(folder).uid}), so this one cannot run the lab kept there. Nothing was changed. Start as that user, or set QUARTERTURN_HOME to a folder of your own.`
		);
	}
	return {
		folder,
		hash: createHash('sha256').update(folder).digest('hex').slice(0, 12),
		file: (...parts) => join(folder, ...parts),
		logFile(program) {
			mkdirSync(join(folder, 'logs'), { recursive: true, mode: 0o700 });
			return join(folder, 'logs', `${program}.log`);
		}
	};
}

function isWritable(folder: string): boolean {
	try {
		accessSync(folder, constants.R_OK | constants.W_OK | constants.X_OK);
		return true;
	} catch {
		return false;
	}
}
