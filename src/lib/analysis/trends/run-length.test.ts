import { describe, expect, it } from 'vitest';
import { referenceCase } from '../../../../tests/factories/reference';
import { cusumRunLength, oneSidedCusumRunLength } from './cusum-run-length';
import { ewmaRunLength } from './ewma-run-length';
import { gaussLegendre } from './gauss-legendre';
import { poissonCusum, poissonCusumReference, poissonCusumRunLength } from './poisson-cusum';
import { runLengthPosterior } from './run-length-posterior';

const FILE = '15_control_charts.json';
const off = (got: number, expected: number) => Math.abs(got / expected - 1);

describe('ewmaRunLength', () => {
	it('agrees with the published table within 0.1 % (Lucas and Saccucci 1990, Table 3)', () => {
		for (const [lambda, width, ...lengths] of [
			[0.5, 3.071, 499.91, 88.8, 17.477, 3.628],
			[0.25, 2.998, 499.84, 48.29, 11.136, 3.614],
			[0.2, 2.962, 499.74, 41.76, 10.542, 3.743],
			[0.1, 2.814, 499.58, 31.3, 10.331, 4.362],
			[0.05, 2.615, 499.93, 28.76, 11.383, 5.225],
			[0.03, 2.437, 499.86, 29.32, 12.598, 5.987],
			[0.2, 2.86, 371.1, 36.2, 9.802, 3.593]
		]) {
			[0, 0.5, 1, 2].forEach((shift, i) => {
				expect(off(ewmaRunLength(lambda, width, shift), lengths[i])).toBeLessThan(1e-3);
			});
		}
	});

	it('agrees with the integral equation solved with 400 nodes (numpy)', () => {
		const { expected } = referenceCase<
			unknown,
			{ lam: number; L: number; arl: Record<string, number> }[]
		>(FILE, 'ewma_arl');
		for (const { lam, L, arl } of expected) {
			for (const [shift, length] of Object.entries(arl)) {
				expect(off(ewmaRunLength(lam, L, Number(shift)), length)).toBeLessThan(1e-5);
			}
		}
	});

	it('is 1/p of a signal when only the newest value counts (closed form)', () => {
		expect(off(ewmaRunLength(1, 3, 0), 370.3983473)).toBeLessThan(1e-8);
	});

	it('is the same for a rise and a fall, and refuses a width of 0', () => {
		expect(ewmaRunLength(0.2, 2.86, -1)).toBeCloseTo(ewmaRunLength(0.2, 2.86, 1), 8);
		expect(() => ewmaRunLength(0.2, 0, 1)).toThrow(RangeError);
		expect(() => ewmaRunLength(1.2, 3, 1)).toThrow(RangeError);
	});
});

describe('cusumRunLength', () => {
	it('agrees with the published 168, 26.6, 8.38, 3.34 (Lucas and Crosier 1982)', () => {
		const shifts = [0, 0.5, 1, 2];
		const got = shifts.map((shift) => cusumRunLength(0.5, 4, shift));
		[167.68, 26.63, 8.383, 3.343].forEach((length, i) =>
			expect(off(got[i], length)).toBeLessThan(1e-3)
		);
	});

	it('agrees with the integral equation solved with 200 nodes (numpy)', () => {
		const { expected } = referenceCase<
			unknown,
			{ k: number; h: number; arl: Record<string, number>; oneSided0: number }[]
		>(FILE, 'cusum_arl');
		for (const { k, h, arl, oneSided0 } of expected) {
			expect(off(oneSidedCusumRunLength(k, h, 0), oneSided0)).toBeLessThan(1e-6);
			for (const [shift, length] of Object.entries(arl)) {
				expect(off(cusumRunLength(k, h, Number(shift)), length)).toBeLessThan(1e-6);
			}
		}
	});

	it('refuses a limit of 0', () => {
		expect(() => cusumRunLength(0.5, 0, 0)).toThrow(RangeError);
	});
});

describe('gaussLegendre', () => {
	it('integrates polynomials below degree 2n exactly, its weights adding up to the length', () => {
		const { x, weight } = gaussLegendre(5, -1, 3);
		const integral = (power: number) => x.reduce((sum, at, i) => sum + weight[i] * at ** power, 0);
		for (let power = 0; power <= 9; power++) {
			const exact = (3 ** (power + 1) - (-1) ** (power + 1)) / (power + 1);
			expect(off(integral(power), exact)).toBeLessThan(1e-13);
		}
		expect(x).toEqual(x.toSorted());
		expect(() => gaussLegendre(0, 0, 1)).toThrow(RangeError);
	});
});

describe('Poisson CUSUM', () => {
	it('has the reference value and the run lengths of a fall from 6 to 3 (exact chain)', () => {
		const { expected } = referenceCase<unknown, Record<string, number>>('00_checks.json', 'g7');
		expect(poissonCusumReference(6, 3)).toBeCloseTo(expected.kOptimal, 9);
		for (const [mean, h, length] of [
			[6, 5, expected['arl0 k=4.25 h=5']],
			[3, 5, expected.arl1],
			[6, 7, expected['arl0 k=4.25 h=7']],
			[3, 7, expected['arl1 h=7']]
		]) {
			expect(off(poissonCusumRunLength(mean, 4.25, h), length)).toBeLessThan(1e-9);
		}
	});

	it('has the run lengths of the reference chains (numpy)', () => {
		const { expected } = referenceCase<unknown, Record<string, number>[]>(
			FILE,
			'poisson_cusum_down'
		);
		for (const { mu0, mu1, k, h, kOptimal, arl0, arl1 } of expected) {
			expect(poissonCusumReference(mu0, mu1)).toBeCloseTo(kOptimal, 12);
			expect(off(poissonCusumRunLength(mu0, k, h), arl0)).toBeLessThan(1e-7);
			expect(off(poissonCusumRunLength(mu1, k, h), arl1)).toBeLessThan(1e-7);
		}
	});

	it('adds what each count lacks and passes over a missing one (worked by hand)', () => {
		expect([...poissonCusum([6, 3, NaN, 2, 9, 0], 4.25)]).toEqual([0, 1.25, 1.25, 3.5, 0, 4.25]);
	});

	it('refuses a rise and limits that its chain cannot hold', () => {
		expect(() => poissonCusumReference(3, 6)).toThrow(RangeError);
		expect(() => poissonCusumRunLength(6, 4.3, 5)).toThrow(RangeError);
		expect(() => poissonCusumRunLength(0, 4.25, 5)).toThrow(RangeError);
		expect(poissonCusumRunLength(6, 4.3, 5, 10)).toBeGreaterThan(100);
	});
});

describe('runLengthPosterior', () => {
	interface Input {
		readonly x: number[];
		readonly gammaShape: number;
		readonly gammaRate: number;
		readonly hazard: number;
	}
	const posterior = ({ x, gammaShape, gammaRate, hazard }: Input) =>
		runLengthPosterior(Object.freeze([...x]), gammaShape, gammaRate, hazard);
	const worst = (got: Float64Array, expected: number[]) =>
		Math.max(...expected.map((p, r) => Math.abs(got[r] - p)));

	it('equals the enumeration of every segmentation', () => {
		const { input, expected, tol } = referenceCase<Input, { runLengthPosterior: number[][] }>(
			'16_bocpd.json',
			'short_vs_enumeration'
		);
		posterior(input).forEach((row, t) => {
			expect(row).toHaveLength(t + 2);
			expect(worst(row, expected.runLengthPosterior[t])).toBeLessThan(tol);
		});
		const short = referenceCase<unknown, { posterior: number[] }>('00_checks.json', 'g8');
		expect(worst(posterior(input)[5], short.expected.posterior)).toBeLessThan(1e-9);
	});

	it('finds one change (numpy)', () => {
		const { input, expected, tol } = referenceCase<
			Input,
			{
				mapRunLength: number[];
				meanRunLength: number[];
				probRunLengthAtMost5: number[];
				lastPosterior: number[];
			}
		>('16_bocpd.json', 'one_change');
		const rows = posterior(input);
		rows.forEach((row, t) => {
			expect(row.indexOf(Math.max(...row))).toBe(expected.mapRunLength[t]);
			const mean = row.reduce((sum, p, r) => sum + p * r, 0);
			expect(Math.abs(mean - expected.meanRunLength[t])).toBeLessThan(tol);
			const recent = row.slice(0, 6).reduce((sum, p) => sum + p, 0);
			expect(Math.abs(recent - expected.probRunLengthAtMost5[t])).toBeLessThan(tol);
		});
		expect(worst(rows[rows.length - 1], expected.lastPosterior)).toBeLessThan(tol);
	});

	it('sums to 1, and a day without a count changes nothing', () => {
		const whole = runLengthPosterior([5, 2, 0], 2, 0.4, 0.1);
		const gapped = runLengthPosterior([5, NaN, 2, 0], 2, 0.4, 0.1);
		expect(gapped[1]).toEqual(gapped[0]);
		expect(gapped[3]).toEqual(whole[2]);
		for (const row of gapped) expect(row.reduce((sum, p) => sum + p, 0)).toBeCloseTo(1, 12);
	});

	it('refuses a hazard of 0 or 1', () => {
		expect(() => runLengthPosterior([1], 2, 0.4, 0)).toThrow(RangeError);
		expect(() => runLengthPosterior([1], 2, 0.4, 1)).toThrow(RangeError);
		expect(() => runLengthPosterior([1], 0, 0.4, 0.5)).toThrow(RangeError);
	});
});
