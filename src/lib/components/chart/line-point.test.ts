import { expect, test } from 'vitest';
import { valueDomain } from './line-point';

test('the view holds points, intervals, references and zero', () => {
	const points = [
		{ x: 0, y: 4, interval: [3, 9] as const },
		{ x: 1, y: null },
		{ x: 2, y: Number.NaN }
	];
	expect(valueDomain(points, [])).toEqual([0, 9]);
	expect(valueDomain(points, [{ y: 60, label: 'chance' }])).toEqual([0, 60]);
});

test('a series without data or height can still be drawn', () => {
	expect(valueDomain([], [])).toEqual([0, 1]);
	expect(valueDomain([{ x: 0, y: 0 }], [])).toEqual([0, 1]);
});
