import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { binomialAtLeast, binomialAtMost, binomialLogPmf } from './binomial';
import { chiSquaredCdf, chiSquaredQuantile, chiSquaredUpperTail } from './chi-squared';
import {
	negativeBinomialAtLeast,
	negativeBinomialAtMost,
	negativeBinomialLogPmf
} from './negative-binomial';
import { normalCdf, normalDensity, normalQuantile, normalUpperTail } from './normal';
import { poissonAtLeast, poissonAtMost, poissonLogPmf } from './poisson';
import { smallestCount } from './smallest-count';
import { studentQuantile, studentUpperTail } from './student-t';

/** Relative distance; the numbers written out below are from scipy.stats 1.17.1. */
const off = (got: number, expected: number) => Math.abs(got / expected - 1);

describe('normal distribution', () => {
	it('agrees with scipy.stats.norm, far into the tails', () => {
		expect(off(normalCdf(1.96), 0.9750021048517795)).toBeLessThan(1e-13);
		expect(off(normalUpperTail(8), 6.22096057427174e-16)).toBeLessThan(1e-12);
		expect(off(normalCdf(-30), 4.906713927147908e-198)).toBeLessThan(1e-11);
		expect(off(normalQuantile(0.00135), -2.9999769927033935)).toBeLessThan(1e-13);
		expect(off(normalDensity(1.5), 0.12951759566589174)).toBeLessThan(1e-14);
	});

	it('has its quantile undo the distribution function, and ends at infinity', () => {
		for (let z = -6; z <= 3; z += 0.25) expect(normalQuantile(normalCdf(z))).toBeCloseTo(z, 11);
		expect(normalQuantile(0)).toBe(-Infinity);
		expect(normalQuantile(1)).toBe(Infinity);
		expect(() => normalQuantile(1.01)).toThrow(RangeError);
		expect(() => normalQuantile(NaN)).toThrow(RangeError);
	});
});

describe('chi-squared distribution', () => {
	it('agrees with scipy.stats.chi2', () => {
		expect(off(chiSquaredCdf(3.2, 4), 0.47506905321389586)).toBeLessThan(1e-13);
		expect(off(chiSquaredUpperTail(60, 3), 5.878230727906921e-13)).toBeLessThan(1e-12);
		expect(off(chiSquaredQuantile(0.025, 10), 3.2469727802368413)).toBeLessThan(1e-12);
		expect(off(chiSquaredUpperTail(0.5, 0.7), 0.3509752970315835)).toBeLessThan(1e-12);
	});

	it('is exponential with two degrees of freedom (closed form)', () => {
		for (const x of [0.01, 1, 7, 40]) {
			expect(off(chiSquaredUpperTail(x, 2), Math.exp(-x / 2))).toBeLessThan(1e-13);
		}
	});

	it('has all its weight above 0 and refuses degrees of freedom of 0', () => {
		expect([chiSquaredCdf(-1, 3), chiSquaredUpperTail(0, 3)]).toEqual([0, 1]);
		expect([chiSquaredQuantile(0, 3), chiSquaredQuantile(1, 3)]).toEqual([0, Infinity]);
		expect(chiSquaredCdf(NaN, 3)).toBeNaN();
		expect(() => chiSquaredCdf(1, 0)).toThrow(RangeError);
		expect(() => chiSquaredQuantile(-0.1, 3)).toThrow(RangeError);
	});
});

describe('Poisson distribution', () => {
	it('gives the tails and the zero of a mean of 6 (scipy.stats.poisson)', () => {
		const { expected, tol } = referenceCase<unknown, Record<string, number>>(
			'00_checks.json',
			'g6'
		);
		const got = [poissonAtMost(1, 6), poissonAtMost(0, 6), poissonAtLeast(12, 6)];
		const want = [expected['P(X<=1)'], expected['P(X<=0)'], expected['P(X>=12)']];
		expect(worstDifference(got, want)).toBeLessThan(Math.min(tol, 1e-14));
	});

	it('agrees with scipy.stats.poisson, far into the tails', () => {
		expect(off(poissonLogPmf(3, 4.5), -1.779527278899233)).toBeLessThan(1e-13);
		expect(off(poissonAtLeast(60, 20), 4.2332846947129256e-13)).toBeLessThan(1e-11);
		expect(off(poissonAtMost(900, 1000), 0.0006977673277963054)).toBeLessThan(1e-10);
	});

	it('has tails that are the sums of its terms', () => {
		for (const mean of [0.02, 1, 6.5, 30]) {
			let below = 0;
			for (let k = 0; k <= 60; k++) {
				expect(poissonAtLeast(k, mean)).toBeCloseTo(1 - below, 12);
				below += Math.exp(poissonLogPmf(k, mean));
				expect(poissonAtMost(k, mean)).toBeCloseTo(below, 12);
				expect(poissonAtMost(k + 0.5, mean)).toBe(poissonAtMost(k, mean));
			}
		}
	});

	it('never counts anything at mean 0', () => {
		expect([poissonLogPmf(0, 0), poissonLogPmf(1, 0)]).toEqual([0, -Infinity]);
		expect([poissonAtMost(0, 0), poissonAtLeast(1, 0)]).toEqual([1, 0]);
	});

	it('has no term at counts that cannot occur and refuses a mean below 0', () => {
		expect([poissonLogPmf(-1, 3), poissonLogPmf(1.5, 3)]).toEqual([-Infinity, -Infinity]);
		expect([poissonAtMost(-1, 3), poissonAtLeast(0, 3)]).toEqual([0, 1]);
		for (const mean of [-1, NaN, Infinity]) {
			expect(() => poissonLogPmf(1, mean)).toThrow(RangeError);
		}
	});
});

describe('binomial distribution', () => {
	it('agrees with scipy.stats.binom', () => {
		expect(off(binomialLogPmf(7, 20, 0.3), -1.8062926549204255)).toBeLessThan(1e-13);
		expect(off(binomialAtMost(7, 20, 0.3), 0.7722717974181608)).toBeLessThan(1e-13);
		expect(off(binomialAtLeast(18, 20, 0.3), 3.773088142370997e-8)).toBeLessThan(1e-11);
	});

	it('has tails that are the sums of its terms, the certain chances 0 and 1 too', () => {
		for (const chance of [0, 0.03, 0.5, 0.8, 1]) {
			let below = 0;
			for (let k = 0; k <= 12; k++) {
				expect(binomialAtLeast(k, 12, chance)).toBeCloseTo(1 - below, 12);
				below += Math.exp(binomialLogPmf(k, 12, chance));
				expect(binomialAtMost(k, 12, chance)).toBeCloseTo(below, 12);
			}
		}
	});

	it('is sure of 0 among no trials and refuses what is no chance', () => {
		expect([binomialLogPmf(0, 0, 0.4), binomialAtMost(0, 0, 0.4)]).toEqual([0, 1]);
		expect([binomialAtLeast(1, 0, 0.4), binomialLogPmf(3, 2, 0.4)]).toEqual([0, -Infinity]);
		expect(binomialLogPmf(0.5, 2, 0.4)).toBe(-Infinity);
		expect(() => binomialLogPmf(1, 2.5, 0.4)).toThrow(RangeError);
		expect(() => binomialAtMost(1, -1, 0.4)).toThrow(RangeError);
		expect(() => binomialAtLeast(1, 2, 1.1)).toThrow(RangeError);
	});
});

describe('negative binomial distribution', () => {
	it('gives P(0) = 1/27 with mean 6 and size 3, and the reference of a large size', () => {
		const { expected } = referenceCase<unknown, Record<string, number>>('00_checks.json', 'g6');
		expect(negativeBinomialAtMost(0, 6, 3)).toBeCloseTo(1 / 27, 14);
		expect(Math.exp(negativeBinomialLogPmf(0, 6, 3))).toBeCloseTo(expected.nb_mean6_size3_P0, 14);
		const large = Math.exp(negativeBinomialLogPmf(0, 8, 10));
		expect(large).toBeCloseTo(expected.nb_mean8_size10_P0, 14);
	});

	it('agrees with scipy.stats.nbinom', () => {
		expect(off(negativeBinomialLogPmf(4, 6, 3), -2.209647097334776)).toBeLessThan(1e-13);
		expect(off(negativeBinomialAtMost(4, 6, 3), 0.42935528120713307)).toBeLessThan(1e-13);
		expect(off(negativeBinomialAtLeast(30, 6, 3), 0.0003268126231863857)).toBeLessThan(1e-11);
	});

	it('has the mean and the variance it is asked for', () => {
		let total = 0;
		let mean = 0;
		let square = 0;
		for (let k = 0; k < 2000; k++) {
			const p = Math.exp(negativeBinomialLogPmf(k, 7, 2.5));
			total += p;
			mean += k * p;
			square += k * k * p;
		}
		expect(total).toBeCloseTo(1, 10);
		expect(mean).toBeCloseTo(7, 9);
		expect(square - mean * mean).toBeCloseTo(7 + 49 / 2.5, 7);
	});

	it('nears the Poisson distribution as its size grows', () => {
		expect(negativeBinomialAtMost(3, 6, 1e7)).toBeCloseTo(poissonAtMost(3, 6), 6);
	});

	it('never counts anything at mean 0 and refuses a size of 0', () => {
		expect([negativeBinomialLogPmf(0, 0, 2), negativeBinomialLogPmf(1, 0, 2)]).toEqual([
			0,
			-Infinity
		]);
		expect([negativeBinomialAtMost(-1, 5, 2), negativeBinomialAtLeast(0, 5, 2)]).toEqual([0, 1]);
		expect(() => negativeBinomialLogPmf(1, 5, 0)).toThrow(RangeError);
		expect(() => negativeBinomialAtMost(1, -5, 2)).toThrow(RangeError);
	});
});

describe("Student's distribution", () => {
	it('agrees with scipy.stats.t', () => {
		expect(off(studentUpperTail(2, 7), 0.042809664281488025)).toBeLessThan(1e-12);
		expect(off(studentQuantile(0.025, 7), 2.3646242515927844)).toBeLessThan(1e-11);
		expect(off(studentQuantile(normalUpperTail(2.962), 7), 4.426683460061915)).toBeLessThan(1e-11);
		expect(off(studentUpperTail(-1.2, 3.5), 0.8474927573110678)).toBeLessThan(1e-12);
	});

	it('is the Cauchy distribution with one degree of freedom (closed form)', () => {
		expect(studentUpperTail(1, 1)).toBeCloseTo(0.25, 13);
		expect(studentQuantile(0.001, 1)).toBeCloseTo(1 / Math.tan(Math.PI * 0.001), 7);
	});

	it('lies at 0 for one half and refuses other tails and no freedom', () => {
		expect(studentQuantile(0.5, 4)).toBe(0);
		expect(() => studentQuantile(0.6, 4)).toThrow(RangeError);
		expect(() => studentQuantile(0, 4)).toThrow(RangeError);
		expect(() => studentUpperTail(1, 0)).toThrow(RangeError);
	});
});

describe('smallestCount', () => {
	it('finds the first count from which a condition holds', () => {
		for (let first = 0; first < 70; first++) expect(smallestCount((k) => k >= first)).toBe(first);
		expect(() => smallestCount(() => false)).toThrow(RangeError);
	});
});
