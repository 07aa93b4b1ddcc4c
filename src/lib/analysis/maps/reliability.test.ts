import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { reliability, spearmanBrown } from './reliability';

describe('spearmanBrown', () => {
	it('steps a half correlation of 0.6 up to 0.75 (closed form)', () => {
		const { input, expected, tol } = referenceCase<{ 'half r': number }, { full: number }>(
			'00_checks.json',
			'e2'
		);
		expect(Math.abs(spearmanBrown(input['half r']) - expected.full)).toBeLessThan(tol);
	});

	it('equals the listed values (numpy)', () => {
		const { input, expected } = referenceCase<{ halfR: number[] }, { fullR: number[] }>(
			'11_stability.json',
			'spearman_brown'
		);
		expect(worstDifference(input.halfR.map(spearmanBrown), expected.fullR)).toBeLessThan(1e-12);
	});

	it('keeps 0 and 1, rises throughout and never leaves −1 to 1', () => {
		expect(spearmanBrown(0)).toBe(0);
		expect(spearmanBrown(1)).toBe(1);
		for (let r = -1; r < 0.99; r += 0.01) {
			expect(spearmanBrown(r)).toBeGreaterThanOrEqual(-1);
			expect(spearmanBrown(r + 0.01)).toBeGreaterThanOrEqual(spearmanBrown(r));
		}
		expect(spearmanBrown(-0.5)).toBe(-1);
		expect(spearmanBrown(-1)).toBe(-1);
	});

	it('is undefined for an undefined correlation and refuses what is none', () => {
		expect(spearmanBrown(NaN)).toBeNaN();
		expect(() => spearmanBrown(1.1)).toThrow(RangeError);
	});
});

describe('reliability', () => {
	it('is that of the bins both halves define', () => {
		const one = Float64Array.of(1, 2, NaN, 3, 9);
		const other = Float64Array.of(1, 3, 8, 2, NaN);
		// By hand over (1,1) (2,3) (3,2): r = 1/2, so 2/3.
		const got = reliability(one, other);
		expect(got.halfR).toBeCloseTo(0.5, 12);
		expect(got.fullR).toBeCloseTo(2 / 3, 12);
	});

	it('is undefined for a silent half', () => {
		expect(reliability(Float64Array.of(1, 2, 3), new Float64Array(3))).toEqual({
			halfR: NaN,
			fullR: NaN
		});
		expect(() => reliability(new Float64Array(2), new Float64Array(3))).toThrow(RangeError);
	});
});
