import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { shuffled } from '../random/shuffled';
import { logSumExp } from './log-sum-exp';
import { pearson } from './pearson';
import { median, quantile, quantileSorted } from './quantile';
import { weightedMedian } from './weighted-median';

describe('quantile', () => {
	it('interpolates between order statistics as type 7 does (numpy.percentile)', () => {
		const errors = Object.freeze([3, 1, 4, 1, 5, 9, 2, 6]);
		expect(median(errors)).toBe(3.5);
		expect(quantile(errors, 0.95)).toBeCloseTo(7.95, 12);
	});

	it('is NaN without values and refuses a share outside 0 to 1', () => {
		expect(median([])).toBeNaN();
		expect(() => quantileSorted([1], 1.1)).toThrow(RangeError);
	});
});

describe('pearson', () => {
	it('is exact on a straight relation and ignores pairs with NaN', () => {
		expect(pearson([1, 2, NaN, 3, 4], [2, 4, 9, 6, 8])).toBeCloseTo(1, 15);
		expect(pearson([1, 2, 3], [3, 2, 1])).toBeCloseTo(-1, 15);
	});

	it('is NaN for a constant side and for fewer than three pairs', () => {
		expect(pearson([1, 1, 1], [1, 2, 3])).toBeNaN();
		expect(pearson([1, 2, NaN], [1, 2, 3])).toBeNaN();
	});
});

describe('logSumExp', () => {
	it('neither overflows nor underflows', () => {
		expect(logSumExp([1000, 1000])).toBeCloseTo(1000 + Math.LN2, 12);
		expect(logSumExp([-4000, -4001])).toBeCloseTo(-4000 + Math.log(1 + Math.exp(-1)), 12);
		expect(logSumExp([-Infinity, -Infinity])).toBe(-Infinity);
	});
});

describe('weightedMedian', () => {
	it('equals the median of the list written out, for any weights', () => {
		const random = seeded(7);
		for (let round = 0; round < 200; round++) {
			const values = Float64Array.from({ length: 1 + random.below(9) }, random.next).sort();
			const group = Int32Array.from(values, (_, i) => i % 3);
			const copies = Int32Array.from({ length: 3 }, () => random.below(4));
			const written = [...values].flatMap((v, i) => Array<number>(copies[group[i]]).fill(v));
			const expected = median(written);
			const got = weightedMedian(values, group, copies);
			if (written.length === 0) expect(got).toBeNaN();
			else expect(got).toBeCloseTo(expected, 15);
		}
	});
});

describe('seeded', () => {
	it('repeats itself for a seed and differs between purposes', () => {
		expect(shuffled(20, seeded(3, 'a'))).toEqual(shuffled(20, seeded(3, 'a')));
		expect(shuffled(20, seeded(3, 'a'))).not.toEqual(shuffled(20, seeded(3, 'b')));
		expect([...shuffled(20, seeded(3))].sort((a, b) => a - b)).toEqual([...Array(20).keys()]);
	});
});
