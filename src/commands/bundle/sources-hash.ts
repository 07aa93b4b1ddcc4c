import { createHash } from 'node:crypto';
import { readdirSync, readFileSync, statSync } from 'node:fs';
import { join } from 'node:path';

const BUILT_FROM = [
	'src',
	'static',
	'package-lock.json',
	'package.json',
	'svelte.config.js',
	'tailwind.config.ts',
	'tsconfig.json',
	'vite.config.ts'
];

/** Changes whenever something that goes into the build changes, and for nothing else. */
export function sourcesHash(checkout: string): string {
	const hash = createHash('sha256');
	for (const path of BUILT_FROM.flatMap((name) => filesBelow(checkout, name))) {
		hash
			.update(`${path}\0`)
			.update(readFileSync(join(checkout, path)))
			.update('\0');
	}
	return hash.digest('hex').slice(0, 16);
}

function filesBelow(checkout: string, path: string): string[] {
	const found = statSync(join(checkout, path), { throwIfNoEntry: false });
	if (!found) return [];
	if (found.isFile()) return isBuilt(path) ? [path] : [];
	return readdirSync(join(checkout, path))
		.sort()
		.flatMap((name) => filesBelow(checkout, `${path}/${name}`));
}

function isBuilt(path: string): boolean {
	return !path.startsWith('src/commands/') && !path.endsWith('.test.ts');
}
