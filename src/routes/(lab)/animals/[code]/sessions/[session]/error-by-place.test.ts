import { describe, expect, it } from 'vitest';
import { errorByPlace } from './error-by-place';

describe('error by place', () => {
	it('is the median of the windows in each stretch, with its middle half and their number', () => {
		const points = errorByPlace([1, 2, 3, 4, 12], [8, 2, 4, 6, 5], 0, 20, 10);
		expect(points).toEqual([
			{ x: 5, y: 6, interval: [4, 8], n: 4 },
			{ x: 15, y: 5, interval: [5, 5], n: 1 }
		]);
	});

	it('has no figure where no window was, and leaves out undefined errors', () => {
		const points = errorByPlace([1, 2], [NaN, 3], 0, 20, 10);
		expect(points[0]).toMatchObject({ y: 3, n: 1 });
		expect(points[1]).toEqual({ x: 15, y: null, n: 0 });
	});

	it('puts the far end into the last stretch, and makes twenty at most', () => {
		const points = errorByPlace([300], [1], 0, 300, 5);
		expect(points).toHaveLength(20);
		expect(points.at(-1)).toMatchObject({ y: 1, n: 1 });
	});
});
