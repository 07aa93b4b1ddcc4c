import { describe, expect, it } from 'vitest';
import type { NamedArray } from '$lib/schemas/named-arrays';
import { busiestS, decodeStretch, firstFrom, rows } from './decode-stretch';

/** Windows of 1 s at 10, 11 and 14 s over two bins; the path is seen twice a second. */
const arrays = new Map<string, NamedArray>([
	['startS', Float64Array.of(10, 11, 14)],
	['decodedBin', Int32Array.of(0, 1, 1)],
	['window', Int32Array.of(0, 1, 2)],
	['shade', Uint8Array.of(255, 10, 20, 255, 30, 255)],
	['fromS', Float64Array.of(10)],
	['afterS', Float32Array.from({ length: 11 }, (_, i) => i / 2)],
	['xCm', Float32Array.from({ length: 11 }, (_, i) => i * 10)]
]);

describe('a stretch of the decoding', () => {
	it('has one column a window and leaves what was not decoded undefined', () => {
		const stretch = decodeStretch(arrays, { fromS: 10, windows: 5, windowS: 1 }, [25, 75]);
		expect([...stretch.shade]).toEqual([255, 10, 20, 255, NaN, NaN, NaN, NaN, 30, 255]);
		expect([...stretch.decodedCm]).toEqual([25, 75, NaN, NaN, 75]);
	});

	it('shows the path between the decoded windows too', () => {
		const { trueCm } = decodeStretch(arrays, { fromS: 10, windows: 6, windowS: 1 }, [25, 75]);
		expect([...trueCm]).toEqual([10, 30, 50, 70, 90, NaN]);
	});

	it('may begin before the first window and end after the last', () => {
		const stretch = decodeStretch(arrays, { fromS: 8, windows: 3, windowS: 1 }, [25, 75]);
		expect([...stretch.decodedCm]).toEqual([NaN, NaN, 25]);
	});
});

describe('kept posteriors', () => {
	it('are found where every k-th window is kept', () => {
		const row = rows(Int32Array.of(0, 3, 6));
		expect([0, 1, 3, 6, 9].map(row)).toEqual([0, -1, 1, 2, -1]);
	});

	it('are found where there is one', () => {
		expect(rows(Int32Array.of(0))(0)).toBe(0);
	});
});

describe('the busiest stretch', () => {
	it('is the one with most windows', () => {
		expect(busiestS([0, 10, 11, 12, 13, 40, 41], 4)).toBe(10);
	});

	it('of nothing begins at zero', () => {
		expect(busiestS([], 40)).toBe(0);
	});
});

describe('the first value from a moment on', () => {
	it.each([
		[0, 0],
		[1, 0],
		[1.5, 1],
		[3, 2],
		[4, 3]
	])('from %d is number %d', (from, at) => {
		expect(firstFrom([1, 2, 3], from)).toBe(at);
	});
});
