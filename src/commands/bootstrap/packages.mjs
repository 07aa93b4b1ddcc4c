import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { setTimeout as sleep } from 'node:timers/promises';
import { matchesLock } from './matches-lock.mjs';
import { tryLock } from './lock.mjs';
import { Refusal } from './refusal.mjs';

const STAMP = 'node_modules/.quarterturn-installed';

/**
 * Makes node_modules what package-lock.json says and generates Kit's types.
 * Everything it has to say goes to standard error: commands keep standard output.
 *
 * @param {string} root
 */
export async function ensurePackages(root) {
	if (isReady(root)) return;
	const release = await waitForLock(join(root, '.quarterturn'));
	try {
		if (!isInstalled(root)) {
			say('Installing packages (npm ci), about a minute …');
			await run('npm', ['ci', '--include=dev', '--loglevel=error', '--no-progress'], root);
			stamp(root);
		}
		if (!hasKitTypes(root)) {
			await run(
				process.execPath,
				[join(root, 'node_modules/@sveltejs/kit/svelte-kit.js'), 'sync'],
				root
			);
		}
	} finally {
		release();
	}
}

/** @param {string} root */
function isReady(root) {
	return isInstalled(root) && hasKitTypes(root);
}

/** @param {string} root */
function hasKitTypes(root) {
	return existsSync(join(root, '.svelte-kit/tsconfig.json'));
}

/** @param {string} root */
function lockHash(root) {
	return createHash('sha256')
		.update(readFileSync(join(root, 'package-lock.json')))
		.digest('hex');
}

/** @param {string} root */
function stamp(root) {
	writeFileSync(join(root, STAMP), lockHash(root));
}

/**
 * The stamp is the quick answer. Without it (somebody ran npm by hand) npm's own
 * record of what it put there is compared, so that no good folder is installed anew.
 *
 * @param {string} root
 */
function isInstalled(root) {
	const stampFile = join(root, STAMP);
	if (existsSync(stampFile) && readFileSync(stampFile, 'utf8') === lockHash(root)) return true;
	const record = join(root, 'node_modules/.package-lock.json');
	if (!existsSync(record)) return false;
	const isSame = matchesLock(
		JSON.parse(readFileSync(join(root, 'package-lock.json'), 'utf8')),
		JSON.parse(readFileSync(record, 'utf8'))
	);
	if (isSame) stamp(root);
	return isSame;
}

/**
 * @param {string} folder
 * @returns {Promise<() => void>}
 */
async function waitForLock(folder) {
	mkdirSync(folder, { recursive: true, mode: 0o711 });
	for (let waited = false; ; waited = true) {
		const lock = tryLock(join(folder, 'install.lock'));
		if ('release' in lock) return lock.release;
		if (!waited)
			say(`Another start (process ${lock.holder.pid}) is installing packages; waiting …`);
		await sleep(500);
	}
}

/**
 * @param {string} command
 * @param {string[]} args
 * @param {string} cwd
 */
function run(command, args, cwd) {
	return new Promise((resolve, reject) => {
		// An inherited production setting would leave out what building needs.
		const env = { ...process.env, NODE_ENV: 'development' };
		const child = spawn(command, args, { cwd, env, stdio: ['ignore', 'pipe', 'inherit'] });
		child.stdout.on('data', (chunk) => process.stderr.write(chunk));
		child.on('error', reject);
		child.on('close', (code) => {
			if (code === 0) resolve(undefined);
			else
				reject(
					new Refusal(
						`"${command} ${args.join(' ')}" failed (exit ${code}); its words are above. Check that the package registry can be reached, then start again.`
					)
				);
		});
	});
}

/** @param {string} text */
function say(text) {
	process.stderr.write(`${text}\n`);
}
