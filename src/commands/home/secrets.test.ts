import { mkdtempSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { openHome, type Home } from './home';
import { secretsOf } from './secrets';

let home: Home;
beforeEach(() => {
	home = openHome(mkdtempSync(join(tmpdir(), 'home-')));
});
afterEach(() => rmSync(home.folder, { recursive: true }));

describe('secretsOf', () => {
	it('makes secrets once and gives the same ones ever after', () => {
		const first = secretsOf(home);
		expect(secretsOf(home)).toEqual(first);
		expect(new Set(Object.values(first)).size).toBe(4);
		expect(readdirSync(home.folder)).toEqual(['secrets.json']);
	});

	it('lets nobody else read the file', () => {
		secretsOf(home);
		expect(statSync(home.file('secrets.json')).mode & 0o777).toBe(0o600);
	});

	it.each(['{"secretKey":', '{}', '{"secretKey":"short"}'])(
		'refuses a damaged file %j and leaves it as it is',
		(damaged) => {
			writeFileSync(home.file('secrets.json'), damaged);
			expect(() => secretsOf(home)).toThrow(/cannot be read.*Nothing was changed/);
			expect(statSync(home.file('secrets.json')).size).toBe(damaged.length);
		}
	);
});
