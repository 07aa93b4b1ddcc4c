import { execFileSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { Refusal } from '../bootstrap/refusal.mjs';
import { findProgram, installPackage, isExecutable, POSTGRES } from '../machine/debian';

/** Exclusion constraints and trusted extensions as the migrations use them. */
const OLDEST_MAJOR = 14;
const DEBIAN_FOLDER = '/usr/lib/postgresql';

export interface PostgresPrograms {
	major: number;
	program(name: 'postgres' | 'initdb' | 'pg_dump' | 'pg_restore'): string;
}

/**
 * PostgreSQL's programs, installed first when they are missing.
 * @param major the version that made an existing cluster; its files open with no other
 */
export async function postgresPrograms(major?: number): Promise<PostgresPrograms> {
	const found = findPostgres(major);
	if (found) return found;
	await installPackage(major ? { ...POSTGRES, name: `postgresql-${major}` } : POSTGRES);
	const installed = findPostgres(major);
	if (!installed) {
		throw new Refusal(
			`PostgreSQL${major ? ` ${major}` : ''} was installed, yet its programs were not found below ${DEBIAN_FOLDER} or on the PATH. Nothing of the lab was changed.`
		);
	}
	return installed;
}

export function findPostgres(major?: number): PostgresPrograms | undefined {
	return [...debianVersions(), ...onPath()].find((found) =>
		major ? found.major === major : found.major >= OLDEST_MAJOR
	);
}

function debianVersions(): PostgresPrograms[] {
	let names: string[];
	try {
		names = readdirSync(DEBIAN_FOLDER);
	} catch {
		return [];
	}
	return names
		.map(Number)
		.filter((major) => isExecutable(join(DEBIAN_FOLDER, String(major), 'bin/initdb')))
		.sort((a, b) => b - a)
		.map((major) => programsIn(join(DEBIAN_FOLDER, String(major), 'bin'), major));
}

function onPath(): PostgresPrograms[] {
	const initdb = findProgram('initdb');
	if (!initdb) return [];
	const words = execFileSync(initdb, ['--version'], { encoding: 'utf8' });
	const major = Number(/(\d+)(\.\d+|\w+)*\s*$/.exec(words.trim())?.[1]);
	return Number.isInteger(major) ? [programsIn(dirname(initdb), major)] : [];
}

function programsIn(folder: string, major: number): PostgresPrograms {
	return { major, program: (name) => join(folder, name) };
}
