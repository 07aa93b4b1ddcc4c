import { expect, test } from 'vitest';
import { safePath } from './safe-path';

const origin = 'https://lab.example';

test('a path of this site is kept whole', () => {
	expect(safePath('/animals/R031?day=3#units', origin)).toBe('/animals/R031?day=3#units');
});

test.each([
	null,
	'',
	'animals',
	'//elsewhere.example/a',
	'/\\elsewhere.example',
	'/\t/elsewhere.example',
	'https://elsewhere.example/',
	'javascript:alert(1)'
])('%j leads to the front page', (wanted) => {
	expect(safePath(wanted, origin)).toBe('/');
});
