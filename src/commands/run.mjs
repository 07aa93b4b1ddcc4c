#!/usr/bin/env node
// The one entry of every command. It may use nothing but Node's own modules until
// the packages are there, so it is plain JavaScript; the commands are TypeScript.
import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { join } from 'node:path';
import process from 'node:process';
import { Refusal } from './bootstrap/refusal.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url));
const [name = '', ...args] = process.argv.slice(2);

/** Settings a person keeps in .env belong to the lab they run, not to tests. */
const COMMANDS_WITHOUT_ENV_FILE = new Set(['test', 'proof']);

function commandNames() {
	return readdirSync(join(root, 'src/commands'))
		.filter((file) => file.endsWith('.ts') && !file.endsWith('.test.ts'))
		.map((file) => file.slice(0, -'.ts'.length))
		.sort();
}

async function main() {
	const major = Number(process.versions.node.split('.')[0]);
	if (major !== 20) {
		throw new Refusal(
			`Quarterturn runs on Node.js 20; this is ${process.version}. Nothing was changed. Install Node.js 20 and start again.`
		);
	}
	if (!commandNames().includes(name)) {
		const what = name === '' ? 'No command given.' : `There is no command "${name}".`;
		throw new Refusal(`${what} Commands: ${commandNames().join(', ')}`);
	}
	const envFile = join(root, '.env');
	if (!COMMANDS_WITHOUT_ENV_FILE.has(name) && existsSync(envFile)) process.loadEnvFile(envFile);

	const { version } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'));
	process.env.QUARTERTURN_VERSION ??= version;

	const { ensurePackages } = await import('./bootstrap/packages.mjs');
	await ensurePackages(root);

	// Threads started later with `--import tsx` find the path aliases through this.
	process.env.TSX_TSCONFIG_PATH = join(root, 'tsconfig.json');
	const { register } = await import('tsx/esm/api');
	register({ tsconfig: process.env.TSX_TSCONFIG_PATH });

	const command = await import(pathToFileURL(join(root, 'src/commands', `${name}.ts`)).href);
	return command.default(args);
}

try {
	process.exitCode = await main();
} catch (error) {
	const text =
		error instanceof Refusal ? error.message : error instanceof Error ? error.stack : error;
	process.stderr.write(`${text}\n`);
	// What a failed command left under way ends here.
	process.exit(error instanceof Refusal ? error.exitCode : 1);
}
