import { describe, expect, it } from 'vitest';
import { referenceCase } from '../../../../tests/factories/reference';
import { fisherMean } from './fisher-mean';
import { fisherZ } from './fisher-z';

describe('fisherMean', () => {
	it('equals numpy arctanh and tanh, plain and weighted by n − 3', () => {
		const { input, expected } = referenceCase<
			{ r: number[]; n: number[] },
			{ fisherMean: number; weightedByNminus3: number }
		>('11_stability.json', 'fisher_z_average');
		expect(fisherMean(input.r)).toBeCloseTo(expected.fisherMean, 10);
		expect(fisherMean(input.r)).toBeCloseTo(0.745586305155, 11);
		expect(fisherMean(input.r, input.n)).toBeCloseTo(expected.weightedByNminus3, 10);
	});

	it('leaves out what is undefined or stands on three points, and is undefined of nothing', () => {
		expect(fisherMean([0.5, NaN])).toBeCloseTo(0.5, 12);
		expect(fisherMean([0.5, 0.9], [10, 3])).toBeCloseTo(0.5, 12);
		expect(fisherMean([])).toBeNaN();
		expect(fisherMean([NaN])).toBeNaN();
		expect(() => fisherMean([0.5], [])).toThrow(RangeError);
	});

	it('is odd, and a correlation of one stays finite', () => {
		expect(fisherMean([-0.3, -0.8])).toBeCloseTo(-fisherMean([0.3, 0.8]), 12);
		expect(fisherZ(1)).toBeCloseTo(Math.atanh(0.999999), 12);
		expect(fisherZ(-1)).toBe(-fisherZ(1));
	});
});
