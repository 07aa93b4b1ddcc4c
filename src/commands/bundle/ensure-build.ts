import { existsSync, mkdirSync, readdirSync, renameSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { stripVTControlCharacters } from 'node:util';
import { holderOf, tryLock } from '../bootstrap/lock.mjs';
import { Refusal } from '../bootstrap/refusal.mjs';
import { CHECKOUT } from '../home/home';
import { runProgram } from '../machine/run-program';
import { say } from '../machine/say';
import { sourcesHash } from './sources-hash';

const BUILDS = join(CHECKOUT, 'build');

/** How many builds stay besides those that a running server uses. */
const KEPT = 2;
const USER_MARK = 'used-by-';

/**
 * The built application for the sources as they are now. Each state of the sources has a
 * folder of its own, renamed into place when whole, so building never pulls the files from
 * under a server that runs: tests and a second lab build beside it.
 */
export async function ensureBuild(): Promise<string> {
	const folder = join(BUILDS, sourcesHash(CHECKOUT));
	if (isWhole(folder)) return folder;
	mkdirSync(BUILDS, { recursive: true });
	const release = await waitForLock();
	try {
		if (!isWhole(folder)) await build(folder);
		removeOld(folder);
	} finally {
		release();
	}
	return folder;
}

/** Keeps the folder from being cleared away while this process serves from it. */
export function useBuild(folder: string): void {
	tryLock(join(folder, `${USER_MARK}${process.pid}`));
}

function isWhole(folder: string): boolean {
	return existsSync(join(folder, 'index.js'));
}

async function build(folder: string): Promise<void> {
	say('Building the application, about half a minute …');
	const part = `${folder}.part`;
	rmSync(part, { recursive: true, force: true });
	const vite = join(CHECKOUT, 'node_modules/vite/bin/vite.js');
	await run([vite, 'build', '--logLevel', 'warn'], part);
	// After the main one, which empties the folder first.
	await run([vite, 'build', '--mode', 'threads', '--logLevel', 'warn'], part);
	renameSync(part, folder);
}

async function run(args: string[], out: string): Promise<void> {
	const { code, words } = await runProgram([process.execPath, ...args], {
		cwd: CHECKOUT,
		env: { ...process.env, NODE_ENV: 'production', QUARTERTURN_BUILD: out }
	});
	if (code !== 0) {
		throw new Refusal(`Building failed (exit ${code}):\n${stripVTControlCharacters(words)}`);
	}
}

async function waitForLock(): Promise<() => void> {
	for (;;) {
		const lock = tryLock(join(BUILDS, 'build.lock'));
		if ('release' in lock) return lock.release;
		await sleep(300);
	}
}

function removeOld(current: string): void {
	const old = readdirSync(BUILDS, { withFileTypes: true })
		.filter((entry) => entry.isDirectory() && /^[0-9a-f]{16}(\.part)?$/.test(entry.name))
		.map((entry) => join(BUILDS, entry.name))
		.filter((folder) => folder !== current && !isUsed(folder));
	const byAge = old.sort((a, b) => madeAt(b) - madeAt(a));
	for (const folder of byAge.slice(KEPT)) rmSync(folder, { recursive: true, force: true });
}

function isUsed(folder: string): boolean {
	return readdirSync(folder).some(
		(name) => name.startsWith(USER_MARK) && holderOf(join(folder, name))
	);
}

function madeAt(folder: string): number {
	return statSync(folder).mtimeMs;
}
