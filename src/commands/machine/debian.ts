import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';
import { Refusal } from '../bootstrap/refusal.mjs';
import { runProgram } from './run-program';
import { say } from './say';

const APT = ['-y', '--no-install-recommends', '-o', 'DPkg::Lock::Timeout=600'];

export interface DebianPackage {
	name: string;
	/** What it is for, to complete "needs … for". */
	purpose: string;
	/** Runs as root before the package is unpacked. */
	prepare?: string;
}

/**
 * Debian makes and starts a cluster of its own when the server package arrives.
 * It would take memory and the standard port, and nobody here would use it.
 */
export const POSTGRES: DebianPackage = {
	name: 'postgresql',
	purpose: 'the database',
	prepare:
		'mkdir -p /etc/postgresql-common && { test -e /etc/postgresql-common/createcluster.conf || echo "create_main_cluster = false" > /etc/postgresql-common/createcluster.conf; }'
};

export const CHROMIUM: DebianPackage = { name: 'chromium', purpose: 'the browser tests' };

export const CURL: DebianPackage = { name: 'curl', purpose: 'the test of the API from a shell' };

/** Installs a Debian package, or refuses with the line a person has to run. */
export async function installPackage(wanted: DebianPackage): Promise<void> {
	const script = [wanted.prepare, aptLine('update'), aptLine(`install ${wanted.name}`)]
		.filter(Boolean)
		.join(' && ');
	if (!findProgram('apt-get')) {
		throw new Refusal(
			`Quarterturn needs ${wanted.name} for ${wanted.purpose}, and this system has no apt-get. Nothing was changed. Install it with the system's own means, then start again.`
		);
	}
	const asRoot = process.getuid?.() === 0 ? [] : ['sudo', '-n'];
	if (asRoot.length > 0 && !(await mayUseSudo())) {
		throw new Refusal(
			`Quarterturn needs Debian's package ${wanted.name} for ${wanted.purpose}. Nothing was changed. Run this once, then start again:\n\n    sudo sh -c '${script}'\n`
		);
	}
	say(`Installing Debian's package ${wanted.name} for ${wanted.purpose} …`);
	const { code, words } = await runProgram([...asRoot, 'sh', '-c', script]);
	if (code !== 0) {
		throw new Refusal(
			`Installing ${wanted.name} failed. What apt-get said last:\n\n${words.split('\n').slice(-8).join('\n')}\n\nNothing of the lab was changed. Mend that, then start again.`
		);
	}
}

function aptLine(words: string): string {
	const [verb, ...rest] = words.split(' ');
	return ['DEBIAN_FRONTEND=noninteractive', 'apt-get', ...APT, '-q', verb, ...rest].join(' ');
}

async function mayUseSudo(): Promise<boolean> {
	return Boolean(findProgram('sudo')) && (await runProgram(['sudo', '-n', 'true'])).code === 0;
}

/** The full path of a program, also where a person's PATH leaves out the system folders. */
export function findProgram(name: string): string | undefined {
	const folders = [...(process.env.PATH ?? '').split(delimiter), '/usr/sbin', '/sbin', '/usr/bin'];
	return folders.map((folder) => join(folder, name)).find(isExecutable);
}

export function isExecutable(file: string): boolean {
	try {
		accessSync(file, constants.X_OK);
		return true;
	} catch {
		return false;
	}
}
