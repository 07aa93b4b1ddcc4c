import { describe, expect, it } from 'vitest';
import { robustSd } from './robust-sd';

describe('robustSd', () => {
	it('is the median absolute deviation over 0.6745 (worked by hand)', () => {
		// Deviations from 3: 2, 1, 0, 1, 97.
		expect(robustSd(Float64Array.of(1, 2, 3, 4, 100))).toBeCloseTo(1 / 0.6744897501960817, 12);
	});

	it('leaves NaN out, is 0 without spread and NaN when empty', () => {
		expect(robustSd(Float64Array.of(1, NaN, 3))).toBeCloseTo(1 / 0.6744897501960817, 12);
		expect(robustSd(Float64Array.of(7, 7, 7, 9))).toBe(0);
		expect(robustSd(new Float64Array(0))).toBeNaN();
	});
});
