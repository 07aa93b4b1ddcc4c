import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { countInterval } from '../statistics/count-interval';
import { countLimits } from './count-limits';
import { cusumChart } from './cusum-chart';
import { dispersion } from './dispersion';
import { ewmaChart } from './ewma-chart';

const FILE = '15_control_charts.json';

describe('ewmaChart', () => {
	interface Input {
		readonly y: number[];
		readonly lambda: number;
		readonly target: number;
		readonly s: number;
		readonly L: number;
	}
	interface Expected {
		readonly printed: number[];
		readonly ewma: number[];
		readonly ucl: number;
		readonly lcl: number;
		readonly timeVaryingUcl: number[];
	}
	const { input, expected, tol } = referenceCase<Input, Expected>(FILE, 'nist_6_3_2_4_ewma');
	const settings = {
		target: input.target,
		sd: input.s,
		lambda: input.lambda,
		width: input.L,
		limits: 'fixed'
	} as const;

	it('gives the printed means, limits and no signal (NIST e-Handbook 6.3.2.4)', () => {
		const chart = ewmaChart(Object.freeze([...input.y]), settings);
		expect(worstDifference(chart.z, expected.ewma.slice(1))).toBeLessThan(tol);
		expect(worstDifference(chart.z, expected.printed.slice(1))).toBeLessThan(0.0051);
		// The handbook rounds √(λ/(2 − λ)) to 0.4201.
		expect(Math.abs(chart.upper[0] - 52.5884)).toBeLessThan(1e-4);
		expect(Math.abs(chart.lower[19] - 47.4115)).toBeLessThan(1e-4);
		expect(Math.abs(chart.upper[7] - expected.ucl)).toBeLessThan(tol);
		expect(Math.abs(chart.lower[7] - expected.lcl)).toBeLessThan(tol);
		expect(chart.signals).toEqual([]);
	});

	it('has growing limits that near the fixed ones (numpy)', () => {
		const { upper, lower } = ewmaChart(input.y, { ...settings, limits: 'growing' });
		expect(worstDifference(upper, expected.timeVaryingUcl)).toBeLessThan(tol);
		expect(upper[3] + lower[3]).toBeCloseTo(2 * input.target, 12);
	});

	it('signals on either side, and passes over a missing value', () => {
		const level = { ...settings, target: 0, sd: 1, lambda: 0.5, width: 1 };
		const chart = ewmaChart([2, NaN, -4, 0], level);
		expect([...chart.z]).toEqual([1, 1, -1.5, -0.75]);
		expect(chart.signals).toEqual([0, 2, 3]);
		const growing = ewmaChart([2, NaN, -4], { ...level, limits: 'growing' });
		expect(growing.upper[1]).toBe(growing.upper[0]);
	});

	it('refuses a weight of 0 and a spread of 0', () => {
		expect(() => ewmaChart([1], { ...settings, lambda: 0 })).toThrow(RangeError);
		expect(() => ewmaChart([1], { ...settings, sd: 0 })).toThrow(RangeError);
		expect(ewmaChart([], settings).z).toHaveLength(0);
	});
});

describe('cusumChart', () => {
	interface Input {
		readonly y: number[];
		readonly target: number;
		readonly k: number;
		readonly h: number;
	}
	interface Expected {
		readonly sHi: number[];
		readonly sLo: number[];
		readonly printedSHi: number[];
		readonly printedSLo: number[];
		readonly signalGroups: number[];
		readonly firstSignal: number;
	}
	const { input, expected, tol } = referenceCase<Input, Expected>(FILE, 'nist_6_3_2_3_cusum');

	it('gives the printed sums and the first alarm at group 14 (NIST e-Handbook 6.3.2.3)', () => {
		const chart = cusumChart(Object.freeze([...input.y]), input);
		expect(worstDifference(chart.high, expected.sHi)).toBeLessThan(tol);
		expect(worstDifference(chart.low, expected.sLo)).toBeLessThan(tol);
		expect(worstDifference(chart.high, expected.printedSHi)).toBeLessThan(0.0051);
		expect(worstDifference(chart.low, expected.printedSLo)).toBeLessThan(0.0051);
		expect(chart.signals.map((i) => i + 1)).toEqual(expected.signalGroups);
		expect(expected.firstSignal).toBe(14);
	});

	it('passes over a missing value and mirrors itself', () => {
		const y = [1, NaN, 3, -2];
		const chart = cusumChart(y, { target: 0, k: 0.5, h: 2 });
		expect([...chart.high]).toEqual([0.5, 0.5, 3, 0.5]);
		expect(chart.signals).toEqual([2]);
		const mirror = cusumChart(
			y.map((v) => -v),
			{ target: 0, k: 0.5, h: 2 }
		);
		expect(mirror.low).toEqual(chart.high);
	});

	it('refuses a limit of 0', () => {
		expect(() => cusumChart([1], { target: 0, k: 0.5, h: 0 })).toThrow(RangeError);
	});
});

describe('countLimits', () => {
	interface Limits {
		readonly mean: number;
		readonly alpha: number;
		readonly size?: number;
		readonly alarmAtOrBelow: number | null;
		readonly alarmAtOrAbove?: number;
		readonly pLow: number;
		readonly pHigh?: number;
	}

	it('are the exact ones of Poisson counts (scipy.stats.poisson)', () => {
		const { expected } = referenceCase<unknown, Limits[]>(FILE, 'poisson_limits');
		for (const { mean, alpha, alarmAtOrBelow, alarmAtOrAbove, pLow, pHigh } of expected) {
			const got = countLimits(mean, alpha);
			expect(got.atOrBelow).toBe(alarmAtOrBelow);
			expect(got.atOrAbove).toBe(alarmAtOrAbove);
			expect(worstDifference([got.pLow, got.pHigh], [pLow, pHigh ?? NaN])).toBeLessThan(1e-12);
		}
	});

	it('are the exact ones of negative binomial counts (scipy.stats.nbinom)', () => {
		const { expected } = referenceCase<unknown, Limits[]>(FILE, 'negative_binomial');
		for (const { mean, size, alpha, alarmAtOrBelow, pLow } of expected) {
			const got = countLimits(mean, alpha, size);
			expect(got.atOrBelow).toBe(alarmAtOrBelow);
			expect(Math.abs(got.pLow - pLow)).toBeLessThan(1e-12);
		}
	});

	it('have no lower one exactly when silence is too likely', () => {
		expect(countLimits(-Math.log(0.0251), 0.05).atOrBelow).toBeNull();
		expect(countLimits(-Math.log(0.0249), 0.05).atOrBelow).toBe(0);
		expect(() => countLimits(0, 0.05)).toThrow(RangeError);
		expect(() => countLimits(5, 0)).toThrow(RangeError);
	});
});

describe('countInterval', () => {
	it("is Garwood's (scipy.stats.chi2; base R)", () => {
		const { expected } = referenceCase<unknown, { n: number; ci95: [number, number] }[]>(
			FILE,
			'poisson_exact_interval'
		);
		for (const { n, ci95 } of expected) {
			const { low, high } = countInterval(n);
			expect(worstDifference([low, high], ci95)).toBeLessThan(1e-9);
		}
		expect(countInterval(5).low).toBeCloseTo(1.62348639, 8);
		expect(countInterval(5).high).toBeCloseTo(11.668332079, 8);
		expect(countInterval(0)).toEqual({ low: 0, high: expect.closeTo(3.688879454, 8) as number });
	});

	it('refuses what is no count', () => {
		expect(() => countInterval(1.5)).toThrow(RangeError);
		expect(() => countInterval(-1)).toThrow(RangeError);
		expect(() => countInterval(1, 1)).toThrow(RangeError);
	});
});

describe('dispersion', () => {
	it('compares the spread with that of Poisson counts (scipy, numpy)', () => {
		const { input, expected } = referenceCase<{ counts: number[] }, Record<string, number>>(
			FILE,
			'dispersion_estimate'
		);
		const got = dispersion(Object.freeze([...input.counts]));
		expect(got.mean).toBeCloseTo(expected.mean, 9);
		expect(got.variance).toBeCloseTo(expected.variance, 9);
		expect(got.size).toBeCloseTo(expected.momentSize, 9);
		expect(got.fano).toBeCloseTo(expected.fanoFactor, 9);
		expect(got.chi2).toBeCloseTo(expected.poissonDispersionChi2, 9);
		expect(got.p).toBeCloseTo(expected.poissonDispersionP, 12);
	});

	it('is Poisson when counts spread less than their mean, and undefined for one count', () => {
		expect(dispersion([4, 5, 4, 5, NaN]).size).toBe(Infinity);
		expect(dispersion([4]).variance).toBeNaN();
		expect(dispersion([0, 0]).p).toBeNaN();
	});
});
