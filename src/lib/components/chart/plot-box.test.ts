import { expect, test } from 'vitest';
import { nearestIndex, plotBox, pointAfterKey } from './plot-box';

test('a plot narrower than its margins still has an inside', () => {
	const box = plotBox(40, 20, { top: 15, right: 30, bottom: 15, left: 30 });
	expect(box.right).toBeGreaterThan(box.left);
	expect(box.bottom).toBeGreaterThan(box.top);
});

test('the nearest point skips undefined ones', () => {
	expect(nearestIndex([0, Number.NaN, 10], 6)).toBe(2);
	expect(nearestIndex([], 6)).toBe(-1);
});

test.each([
	['ArrowRight', null, 0],
	['ArrowRight', 4, 4],
	['ArrowLeft', 0, 0],
	['PageUp', 1, 4],
	['Home', 3, 0],
	['End', 0, 4],
	['Tab', 2, null]
])('%s from %s leads to %s of five points', (key, at, to) => {
	expect(pointAfterKey(key, at, 5)).toBe(to);
});
