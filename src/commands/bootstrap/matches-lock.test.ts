import { describe, expect, it } from 'vitest';
import { matchesLock } from './matches-lock.mjs';

const lock = {
	packages: {
		'': {},
		'node_modules/a': { version: '1.0.0', integrity: 'sha512-a' },
		'node_modules/b-linux': { version: '2.0.0', optional: true }
	}
};
const a = { version: '1.0.0', integrity: 'sha512-a' };

describe('matchesLock', () => {
	it.each([
		[
			'the same packages',
			{ 'node_modules/a': a, 'node_modules/b-linux': { version: '2.0.0' } },
			true
		],
		['an optional package left out', { 'node_modules/a': a }, true],
		['a package missing', {}, false],
		['another version', { 'node_modules/a': { version: '1.0.1' } }, false],
		['other content', { 'node_modules/a': { ...a, integrity: 'sha512-x' } }, false],
		['a package too many', { 'node_modules/a': a, 'node_modules/c': { version: '1.0.0' } }, false]
	])('%s → %s', (_, packages, expected) => {
		expect(matchesLock(lock, { packages })).toBe(expected);
	});
});
