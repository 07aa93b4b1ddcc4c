import { chmodSync, mkdirSync, renameSync, rmSync } from 'node:fs';
import { Refusal } from '../bootstrap/refusal.mjs';
import { postgresPrograms } from '../cluster/programs';
import { withClient } from '../cluster/roles';
import type { Home } from '../home/home';
import { runProgram } from '../machine/run-program';

/**
 * A copy of the whole database in pg_dump's own format, readable by this user alone.
 * @returns the file
 */
export async function backUp(home: Home, ownerUrl: string, reason: string): Promise<string> {
	mkdirSync(home.file('backups'), { recursive: true, mode: 0o700 });
	const stamp = new Date().toISOString().replace(/[:.]/g, '-');
	const file = home.file('backups', `${stamp}-${reason}.dump`);
	const programs = await postgresPrograms();
	try {
		await dump(programs.program('pg_dump'), ownerUrl, `${file}.part`);
		chmodSync(`${file}.part`, 0o600);
		renameSync(`${file}.part`, file);
	} finally {
		rmSync(`${file}.part`, { force: true });
	}
	return file;
}

/** A database without a person has nothing to lose. */
export async function isEmpty(ownerUrl: string): Promise<boolean> {
	return withClient(ownerUrl, async (client) => {
		const { rows } = await client.query("SELECT to_regclass('person') AS found");
		if (!rows[0].found) return true;
		return (await client.query('SELECT 1 FROM person LIMIT 1')).rowCount === 0;
	});
}

async function dump(program: string, url: string, file: string): Promise<void> {
	const login = new URL(url);
	const args = [
		'--format=custom',
		`--file=${file}`,
		`--host=${login.hostname}`,
		`--port=${login.port || '5432'}`,
		`--username=${decodeURIComponent(login.username)}`,
		'--no-password',
		login.pathname.slice(1)
	];
	// The password goes through the environment: arguments can be read by every user.
	const env = { ...process.env, PGPASSWORD: decodeURIComponent(login.password) };
	const { code, words } = await runProgram([program, ...args], { env });
	if (code !== 0) {
		throw new Refusal(
			`The backup before the update failed, so the update was not made and the records are as they were. What pg_dump said:\n\n${words}`
		);
	}
}
