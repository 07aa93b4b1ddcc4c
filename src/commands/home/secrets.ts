import { randomBytes } from 'node:crypto';
import { existsSync, linkSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { Refusal } from '../bootstrap/refusal.mjs';
import type { Home } from './home';

export interface Secrets {
	/** Signs links in mails and feed addresses; a new one would break those already sent. */
	secretKey: string;
	superuserPassword: string;
	ownerPassword: string;
	appPassword: string;
}

const NAMES: (keyof Secrets)[] = ['secretKey', 'superuserPassword', 'ownerPassword', 'appPassword'];

/** Made once, readable by this user alone, then kept for good. */
export function secretsOf(home: Home): Secrets {
	const file = home.file('secrets.json');
	if (!existsSync(file)) writeOnce(file);
	try {
		return check(JSON.parse(readFileSync(file, 'utf8')));
	} catch (cause) {
		throw new Refusal(
			`${file} cannot be read (${cause instanceof Error ? cause.message : cause}). Nothing was changed. Put the file back from a copy; if there is none, move it away and start again: links in mails already sent then stop working, the records stay.`
		);
	}
}

function writeOnce(file: string): void {
	const fresh = Object.fromEntries(NAMES.map((name) => [name, randomBytes(32).toString('hex')]));
	// Written aside and linked: a crash leaves no half file, and of two writers the first one's stays.
	const aside = `${file}.${process.pid}`;
	writeFileSync(aside, `${JSON.stringify(fresh, null, 2)}\n`, { mode: 0o600 });
	try {
		linkSync(aside, file);
	} catch (error) {
		if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
	} finally {
		rmSync(aside, { force: true });
	}
}

function check(read: unknown): Secrets {
	const found = read as Partial<Record<keyof Secrets, unknown>>;
	const [secretKey, superuserPassword, ownerPassword, appPassword] = NAMES.map((name) => {
		const value = found?.[name];
		if (typeof value !== 'string' || value.length < 32) throw new Error(`"${name}" is missing`);
		return value;
	});
	return { secretKey, superuserPassword, ownerPassword, appPassword };
}
