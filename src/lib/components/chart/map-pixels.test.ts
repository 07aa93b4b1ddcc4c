import { expect, test } from 'vitest';
import { largest, mapPixels, transposed } from './map-pixels';
import { themeRamp } from './ramp';

const ramp = themeRamp('red');
const ink = Array.from(ramp.slice(-3));

test('the first row of a map is drawn at the bottom', () => {
	const pixels = mapPixels({ values: [1, 0, 0, 0], columns: 2, rows: 2, most: 1 }, ramp);
	expect(Array.from(pixels.slice(8, 11))).toEqual(ink);
	expect(Array.from(pixels.slice(0, 4))).toEqual([0, 0, 0, 255]);
});

test('undefined places are transparent, silence is not', () => {
	const pixels = mapPixels({ values: [Number.NaN, null, 0], columns: 3, rows: 1, most: 5 }, ramp);
	expect([pixels[3], pixels[7], pixels[11]]).toEqual([0, 0, 255]);
});

test('a map without any spike is dark and does not divide by zero', () => {
	const pixels = mapPixels({ values: [0, 0], columns: 2, rows: 1, most: 0 }, ramp);
	expect(Array.from(pixels)).toEqual([0, 0, 0, 255, 0, 0, 0, 255]);
});

test('a grid of the wrong size is refused', () => {
	expect(() => mapPixels({ values: [1], columns: 2, rows: 1, most: 1 }, ramp)).toThrow(RangeError);
});

test('a posterior of windows becomes columns', () => {
	expect(Array.from(transposed([1, 2, 3, 4, 5, 6], 2, 3))).toEqual([1, 4, 2, 5, 3, 6]);
});

test('the largest value ignores undefined places', () => {
	expect(largest([null, Number.NaN, 3, 1])).toBe(3);
	expect(largest([])).toBe(0);
});
