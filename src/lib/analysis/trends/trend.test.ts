import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { exactKendallP } from './exact-kendall';
import { mannKendall } from './mann-kendall';
import { theilSen } from './theil-sen';
import { tieSizes } from './tie-term';
import { trendInflation } from './trend-inflation';

interface Series {
	readonly day: readonly number[];
	readonly y: readonly number[];
}

interface Trend {
	readonly theilSen: { slope: number; intercept: number; ci95: [number, number] };
	readonly mannKendall: { S: number; varS: number; z: number; pTwoSided: number };
	readonly kendallTauB?: number | null;
}

// scipy.stats.theilslopes and kendalltau, see tests/fixtures/reference.
describe.each([
	'trend_fixed',
	'trend_no_ties',
	'trend_counts_with_ties',
	'trend_constant',
	'trend_missing_days'
])('%s (scipy 1.10.1)', (id) => {
	const { input, expected, tol } = referenceCase<Series, Trend>('14_trend.json', id);

	it('has the slope, the intercept and the limits of Theil and Sen', () => {
		const got = theilSen(Object.freeze([...input.day]), Object.freeze([...input.y]));
		const { slope, intercept, ci95 } = expected.theilSen;
		expect(Math.abs(got.slope - slope)).toBeLessThan(tol);
		expect(Math.abs(got.intercept - intercept)).toBeLessThan(tol);
		expect(Math.abs(got.low - ci95[0])).toBeLessThan(tol);
		expect(Math.abs(got.high - ci95[1])).toBeLessThan(tol);
	});

	it("has Kendall's S, its variance, score, p and tau", () => {
		const got = mannKendall(Object.freeze([...input.y]));
		const { S, varS, z, pTwoSided } = expected.mannKendall;
		expect(got.s).toBe(S);
		expect(Math.abs(got.varS - varS)).toBeLessThan(tol);
		expect(Math.abs(got.z - z)).toBeLessThan(tol);
		expect(Math.abs(got.p - pTwoSided)).toBeLessThan(tol);
		if (expected.kendallTauB === undefined) return;
		expect(worstDifference([got.tauB], [expected.kendallTauB])).toBeLessThan(1e-12);
	});
});

it('agrees with the short check of the trend (scipy, base R)', () => {
	const { input, expected } = referenceCase<
		{ y: number[] },
		{ slope: number; intercept: number; S: number; varS: number; z: number; pTwoSided: number }
	>('00_checks.json', 'g1');
	const line = theilSen([...input.y.keys()], input.y);
	expect(line.slope).toBe(expected.slope);
	expect(line.intercept).toBe(expected.intercept);
	const test = mannKendall(input.y);
	expect([test.s, test.varS]).toEqual([expected.S, expected.varS]);
	expect(test.z).toBeCloseTo(-2.909090909, 9);
	expect(test.p).toBeCloseTo(0.003624814385, 12);
	expect(test.tauB).toBeCloseTo(-0.768273325, 9);
});

describe('theilSen', () => {
	it('finds a line exactly, whatever the gaps, and one wild day hardly moves it', () => {
		const days = [0, 1, 4, 9, 11, 20];
		const y = days.map((day) => 3 - 0.25 * day);
		expect(theilSen(days, y)).toMatchObject({ slope: -0.25, intercept: 3, low: -0.25, n: 6 });
		expect(theilSen(days, [...y.slice(0, 5), 90]).slope).toBeCloseTo(-0.25, 12);
	});

	it('leaves out days without a value, whose order does not matter', () => {
		const all = theilSen([0, 1, 2, 3], [5, 4, NaN, 2]);
		expect(all).toEqual(theilSen([3, 0, 1], [2, 5, 4]));
		expect(all.n).toBe(3);
	});

	it('has no slope with fewer than two different days', () => {
		for (const days of [[], [3], [3, 3]]) {
			expect(theilSen(days, days).slope).toBeNaN();
			expect(theilSen(days, days).intercept).toBeNaN();
		}
	});

	it('refuses lists of different length and levels outside 0 to 1', () => {
		expect(() => theilSen([1], [1, 2])).toThrow(RangeError);
		expect(() => theilSen([1, 2], [1, 2], 1)).toThrow(RangeError);
	});
});

describe('mannKendall', () => {
	it('uses the exact chances below eight days (worked by hand)', () => {
		// Of 4! orders 1 is all falling and 1 all rising; of 5! orders 1 + 4 reach |S| ≥ 8 on a side.
		expect(mannKendall([4, 3, 2, 1]).p).toBeCloseTo(2 / 24, 14);
		expect(mannKendall([5, 4, 3, 1, 2]).p).toBeCloseTo(10 / 120, 14);
		// 2 1 1: three orders of the multiset, S = −2, 0, 2.
		expect(mannKendall([2, 1, 1]).p).toBeCloseTo(2 / 3, 14);
	});

	it('is turned round by time and unmoved by a monotone change of scale', () => {
		const random = seeded(5);
		for (let round = 0; round < 50; round++) {
			const y = Float64Array.from({ length: 2 + random.below(18) }, () => random.below(6));
			const ahead = mannKendall(y);
			const back = mannKendall(y.toReversed());
			expect(back.s).toBe(ahead.s === 0 ? 0 : -ahead.s);
			expect(back.p).toBeCloseTo(ahead.p, 12);
			expect(mannKendall(y.map(Math.exp))).toEqual(ahead);
		}
	});

	it('leaves out days without a value and is silent with one', () => {
		expect(mannKendall([9, NaN, 8, 8])).toEqual(mannKendall([9, 8, 8]));
		expect(mannKendall([4]).p).toBeNaN();
		expect(mannKendall([]).p).toBeNaN();
	});

	it('widens its variance by an inflation, which the exact chances cannot take', () => {
		const y = [9, 8, 8, 7, 9, 6, 6, 5, 4, 5];
		expect(mannKendall(y, 4).varS).toBe(4 * mannKendall(y).varS);
		expect(mannKendall(y, 4).z).toBeCloseTo(mannKendall(y).z / 2, 12);
		expect(mannKendall([4, 3, 2, 1], 2).p).toBeNaN();
		expect(() => mannKendall(y, 0.5)).toThrow(RangeError);
	});
});

describe('exactKendallP', () => {
	it('equals counting all orders of up to six values, ties included', () => {
		const random = seeded(11);
		for (let round = 0; round < 12; round++) {
			const y = Array.from({ length: 2 + random.below(5) }, () => random.below(4));
			const observed = sOf(y);
			const all = orders(y).map((order) => Math.abs(sOf(order)) >= Math.abs(observed));
			const expected = all.filter(Boolean).length / all.length;
			expect(exactKendallP(observed, tieSizes(y))).toBeCloseTo(expected, 12);
		}
	});

	it('is 1 when all values are equal', () => {
		expect(exactKendallP(0, [5])).toBe(1);
	});
});

describe('trendInflation', () => {
	it('is 1 for a constant or a very short series', () => {
		expect([trendInflation([3, 3, 3, 3, 3]), trendInflation([1, 2, 3])]).toEqual([1, 1]);
	});

	it('sums the noticed lags of the ranks about the line (numpy, scipy.stats.rankdata)', () => {
		// Lags 1, 6 and 7 pass 1.96/√20.
		const y = [5, 6, 6, 7, 9, 9, 8, 9, 7, 6, 6, 5, 3, 3, 4, 2, 3, 3, 5, 6];
		expect(trendInflation(Object.freeze(y))).toBeCloseTo(1.486451067427605, 12);
		expect(trendInflation([...y, NaN])).toBe(trendInflation(y));
	});

	it('takes away a good part of the false alarms of correlated days, not all', () => {
		const random = seeded(2);
		let plain = 0;
		let widened = 0;
		const runs = 300;
		for (let run = 0; run < runs; run++) {
			let now = 0;
			const y = Float64Array.from({ length: 60 }, () => {
				now = 0.7 * now + random.next() + random.next() + random.next() - 1.5;
				return now;
			});
			if (mannKendall(y).p < 0.05) plain++;
			if (mannKendall(y, trendInflation(y)).p < 0.05) widened++;
		}
		expect(plain / runs).toBeGreaterThan(0.25);
		expect(widened / runs).toBeLessThan((0.65 * plain) / runs);
	});
});

function sOf(y: readonly number[]): number {
	let s = 0;
	y.forEach((a, i) => y.slice(i + 1).forEach((b) => (s += Math.sign(b - a))));
	return s;
}

function orders(y: readonly number[]): number[][] {
	if (y.length < 2) return [[...y]];
	return y.flatMap((first, i) => orders(y.toSpliced(i, 1)).map((rest) => [first, ...rest]));
}
