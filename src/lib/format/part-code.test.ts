import { describe, expect, it } from 'vitest';
import { partCode, partNamed } from './part-code';

const first = { id: '1', label: 'T07', letter: 'A' };
const second = { id: '2', label: 'T07', letter: 'B' };

describe('partCode', () => {
	it('names the implant from the second one on', () => {
		expect(partCode('R031', first)).toBe('R031-T07');
		expect(partCode('R031', second)).toBe('R031-B-T07');
	});
});

describe('partNamed', () => {
	it.each([
		['T07', first],
		['t07', first],
		['R031-T07', first],
		['A-T07', first],
		['B-T07', second],
		['R031-B-T07', second],
		['2', second]
	])('finds %s', (name, part) => {
		expect(partNamed([second, first], name, 'R031')).toBe(part);
	});

	it.each(['T08', 'C-T07', 'R032-T07', ''])('finds nothing called "%s"', (name) => {
		expect(partNamed([first, second], name, 'R031')).toBeUndefined();
	});
});
