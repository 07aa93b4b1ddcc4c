import { describe, expect, it } from 'vitest';
import { referenceCase } from '../../../../tests/factories/reference';
import { USUAL_LIMITS, weightBand } from './weight-band';
import { baselineWeight, grownBaseline, weightPercent } from './weight-percent';

describe('weightPercent', () => {
	it('is 84.2 % for 320 g of 380 g, and 76.6 % once the growth curve rose by a tenth', () => {
		const { input, expected, tol } = referenceCase<
			{ weight: number; baseline: number; growth: number },
			{ percent: number; adjusted: number }
		>('00_checks.json', 'i1');
		const plain = weightPercent(input.weight, input.baseline);
		expect(Math.abs(plain - expected.percent)).toBeLessThan(tol);
		const grown = grownBaseline(input.baseline, { atBaselineG: 250, nowG: 250 * input.growth });
		const adjusted = weightPercent(input.weight, grown);
		expect(Math.abs(adjusted - expected.adjusted)).toBeLessThan(tol);
		expect(weightBand(plain, USUAL_LIMITS)).toBe('warn');
		expect(weightBand(adjusted, USUAL_LIMITS)).toBe('act');
	});

	it('agrees with the closed forms of the reference', () => {
		const { expected, tol } = referenceCase<
			unknown,
			{
				weightG: number;
				baselineG: number;
				referenceAtBaseline: number;
				referenceToday: number;
				percent: number;
				growthAdjustedBaselineG: number;
				percentAdjusted: number;
				below85: boolean;
				below80: boolean;
			}[]
		>('18_misc.json', 'weight_percent');
		for (const row of expected) {
			const grown = grownBaseline(row.baselineG, {
				atBaselineG: row.referenceAtBaseline,
				nowG: row.referenceToday
			});
			expect(Math.abs(grown - row.growthAdjustedBaselineG)).toBeLessThan(tol);
			const plain = weightPercent(row.weightG, row.baselineG);
			expect(Math.abs(plain - row.percent)).toBeLessThan(tol);
			const adjusted = weightPercent(row.weightG, grown);
			expect(Math.abs(adjusted - row.percentAdjusted)).toBeLessThan(tol);
			const band = weightBand(adjusted, USUAL_LIMITS);
			expect([band !== 'fine', band === 'act']).toEqual([row.below85, row.below80]);
		}
	});

	it('refuses weights that no animal has', () => {
		expect(() => weightPercent(0, 380)).toThrow(RangeError);
		expect(() => weightPercent(320, NaN)).toThrow(RangeError);
		expect(() => grownBaseline(380, { atBaselineG: 0, nowG: 300 })).toThrow(RangeError);
		expect(() => grownBaseline(380, { atBaselineG: 300, nowG: -1 })).toThrow(RangeError);
	});
});

describe('baselineWeight', () => {
	it('is the mean of three to five days', () => {
		expect(baselineWeight([380, 382, 378])).toBe(380);
		expect(baselineWeight([380, 382, 378, 381, 379])).toBe(380);
		expect(() => baselineWeight([380, 382])).toThrow(RangeError);
		expect(() => baselineWeight([1, 2, 3, 4, 5, 6])).toThrow(RangeError);
		expect(() => baselineWeight([380, 382, NaN])).toThrow(RangeError);
	});
});

describe('weightBand', () => {
	it('takes a weight on a limit for not below it', () => {
		const bands = [85, 84.99, 80, 79.99].map((percent) => weightBand(percent, USUAL_LIMITS));
		expect(bands).toEqual(['fine', 'warn', 'warn', 'act']);
	});

	it('follows the limits of the protocol', () => {
		expect(weightBand(88, { warnPercent: 90, actPercent: 85 })).toBe('warn');
		expect(() => weightBand(88, { warnPercent: 80, actPercent: 85 })).toThrow(RangeError);
		expect(() => weightBand(NaN, USUAL_LIMITS)).toThrow(RangeError);
	});
});
