import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { sourcesHash } from './sources-hash';

let checkout: string;
function write(path: string, text: string) {
	mkdirSync(dirname(join(checkout, path)), { recursive: true });
	writeFileSync(join(checkout, path), text);
}
beforeEach(() => {
	checkout = mkdtempSync(join(tmpdir(), 'sources-'));
	write('src/app.html', 'a');
	write('src/commands/start.ts', 'a');
	write('package-lock.json', '{}');
});
afterEach(() => rmSync(checkout, { recursive: true }));

describe('sourcesHash', () => {
	it.each([
		['src/app.html', 'b'],
		['src/lib/new.ts', ''],
		['static/icon.svg', ''],
		['package-lock.json', '{"a":1}']
	])('changes with %s', (path, text) => {
		const before = sourcesHash(checkout);
		write(path, text);
		expect(sourcesHash(checkout)).not.toBe(before);
	});

	it.each(['src/commands/start.ts', 'src/lib/x.test.ts', 'README.md', 'build/index.js'])(
		'does not change with %s, which is not built',
		(path) => {
			const before = sourcesHash(checkout);
			write(path, 'changed');
			expect(sourcesHash(checkout)).toBe(before);
		}
	);

	it('tells a moved file from a changed one', () => {
		write('src/a.ts', 'x');
		const before = sourcesHash(checkout);
		rmSync(join(checkout, 'src/a.ts'));
		write('src/b.ts', 'x');
		expect(sourcesHash(checkout)).not.toBe(before);
	});
});
