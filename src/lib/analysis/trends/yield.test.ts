import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { binomialLogPmf } from '../statistics/binomial';
import { poissonLogPmf } from '../statistics/poisson';
import { AMPLITUDE, amplitudeEvidence } from './amplitude-evidence';
import { learnLevel, learnYield, levelOf, PRIOR, yieldOf, type Baseline } from './bundle-baseline';
import { FALL_SETTINGS, fallStatistic, nextFall, passFall, startFall } from './fall-chart';
import { fallenModel, fallEvidence, FALLS } from './fall-evidence';
import { simulatedBundle, simulateDay } from './simulated-bundle';
import {
	nextCount,
	nextCountAtMost,
	nextCountLogPmf,
	overGap,
	stationaryMean
} from './yield-model';

const usual = { survival: 0.8, arrivals: 1.2 };
const fallen = { survival: 0.55, arrivals: 0.5 };
const ONE_DAY = { previous: 6, today: 3, kept: null, gapDays: 1 };

describe('model of survival and arrival', () => {
	interface Row {
		readonly previous: number;
		readonly pmf0: number[];
		readonly mean: number;
		readonly var: number;
		readonly llr_0to10: number[];
	}
	const { input, expected, tol } = referenceCase<
		{ sequence: number[] },
		{ stationaryMean0: number; rows: Row[]; llrCusum: number[] }
	>('15_control_charts.json', 'inar1_yield');

	it('is binomial survivors plus Poisson newcomers (scipy, numpy.convolve)', () => {
		expect(stationaryMean(usual)).toBeCloseTo(expected.stationaryMean0, 12);
		for (const row of expected.rows) {
			const got = row.pmf0.map((_, n) => Math.exp(nextCountLogPmf(usual, row.previous, n)));
			expect(worstDifference(got, row.pmf0)).toBeLessThan(tol);
			const { mean, variance } = nextCount(usual, row.previous);
			expect(worstDifference([mean, variance], [row.mean, row.var])).toBeLessThan(tol);
			const llr = row.llr_0to10.map((_, today) =>
				fallEvidence({ ...ONE_DAY, previous: row.previous, today }, usual, fallen)
			);
			expect(worstDifference(llr, row.llr_0to10)).toBeLessThan(tol);
		}
	});

	it('has the reference likelihood-ratio CUSUM of totals (numpy)', () => {
		let s = 0;
		const { sequence } = input;
		const got = sequence.slice(1).map((today, i) => {
			s = Math.max(
				0,
				s + fallEvidence({ ...ONE_DAY, previous: sequence[i], today }, usual, fallen)
			);
			return s;
		});
		expect(worstDifference(got, expected.llrCusum)).toBeLessThan(tol);
	});

	it('judges 6 yesterday and 3 today, 2 of them kept (scipy; by hand)', () => {
		const check = referenceCase<unknown, Record<string, number>>('00_checks.json', 'g9').expected;
		expect(Math.exp(nextCountLogPmf(usual, 6, 3))).toBeCloseTo(check.p0, 10);
		expect(Math.exp(nextCountLogPmf(fallen, 6, 3))).toBeCloseTo(check.p1, 10);
		expect(fallEvidence(ONE_DAY, usual, fallen)).toBeCloseTo(check.llrTotals, 9);
		const split = fallEvidence({ ...ONE_DAY, kept: 2 }, usual, fallen);
		expect(split).toBeCloseTo(check.llrKept2New1, 9);
		expect(nextCount(usual, 6).mean).toBeCloseTo(check.conditionalMean, 12);
		expect(nextCount(usual, 6).variance).toBeCloseTo(check.conditionalVar, 12);
	});

	it('spans a gap exactly as so many days one after another', () => {
		const gap = overGap(usual, 3);
		expect(gap.survival).toBeCloseTo(0.512, 12);
		for (const today of [0, 2, 5, 9]) {
			let twoSteps = 0;
			for (let between = 0; between < 60; between++) {
				twoSteps += Math.exp(
					nextCountLogPmf(usual, 4, between) + nextCountLogPmf(overGap(usual, 2), between, today)
				);
			}
			expect(Math.exp(nextCountLogPmf(gap, 4, today))).toBeCloseTo(twoSteps, 10);
		}
		expect(stationaryMean(gap)).toBeCloseTo(6, 12);
		expect(overGap(usual, 1)).toEqual(usual);
	});

	it('adds up to its distribution, from no units too', () => {
		expect(nextCountAtMost(usual, 0, 0)).toBeCloseTo(Math.exp(-1.2), 12);
		expect(nextCountAtMost(usual, 6, 40)).toBeCloseTo(1, 12);
		expect(nextCountLogPmf(usual, 6, -1)).toBe(-Infinity);
	});

	it('refuses chances of 0 and 1, and gaps that are none', () => {
		expect(() => overGap(usual, 0)).toThrow(RangeError);
		expect(() => overGap({ survival: 1, arrivals: 1 }, 2)).toThrow(RangeError);
		expect(() => nextCountLogPmf({ survival: 0.5, arrivals: 0 }, 1, 1)).toThrow(RangeError);
	});
});

describe('fallEvidence', () => {
	it('means the same of matched units as of totals, averaged over what may have been kept', () => {
		// Σ over kept of P₀(kept, new) · exp(evidence of the split) is P₁(today).
		const before = overGap(usual, 2);
		const after = overGap(fallen, 2);
		for (const today of [0, 1, 4, 8]) {
			let mixed = 0;
			for (let kept = 0; kept <= Math.min(5, today); kept++) {
				const split = fallEvidence({ previous: 5, today, kept, gapDays: 2 }, usual, fallen);
				const chance =
					binomialLogPmf(kept, 5, before.survival) + poissonLogPmf(today - kept, before.arrivals);
				mixed += Math.exp(chance + split);
			}
			expect(mixed).toBeCloseTo(Math.exp(nextCountLogPmf(after, 5, today)), 12);
		}
	});

	it('refuses more kept than there were', () => {
		expect(() => fallEvidence({ ...ONE_DAY, kept: 4 }, usual, fallen)).toThrow(RangeError);
	});

	it('looks for a fall by 0.2 and to 0.4, never below half the usual survival', () => {
		const model = fallenModel(usual, FALLS[0]);
		expect(model.survival).toBeCloseTo(0.6, 12);
		expect(model.arrivals).toBeCloseTo(0.48, 12);
		expect(fallenModel({ survival: 0.3, arrivals: 1 }, FALLS[0]).survival).toBe(0.15);
	});
});

describe('amplitudeEvidence', () => {
	const known = { mean: 4, variance: 0 };

	it('is (d·e − d²/2)/σ² (worked by hand)', () => {
		// φ .6, σ .1, δ −.25: d = −.1; e = −.2 − .6·(−.1) = −.14; (.014 − .005)/.01 = .9.
		expect(amplitudeEvidence(3.9, 3.8, 1, known)).toBeCloseTo(0.9, 12);
	});

	it('is nothing when a day had no units', () => {
		expect(amplitudeEvidence(NaN, 3.8, 1, known)).toBe(0);
		expect(amplitudeEvidence(3.9, NaN, 1, known)).toBe(0);
	});

	it('forgets the earlier day over a long gap, and trusts an uncertain level less', () => {
		// e = −.2, d = −.25, σ² = .01/.64: (.05 − .03125)/.015625 = 1.2.
		expect(amplitudeEvidence(9, 3.8, 400, known)).toBeCloseTo(1.2, 12);
		const vague = { mean: 4, variance: 0.0625 };
		expect(amplitudeEvidence(3.9, 3.8, 1, vague)).toBeCloseTo(0.9 / 2, 12);
	});
});

describe('baseline of a bundle', () => {
	it('has mean survival 0.82 after 33 of 40 kept (Beta(8, 2) prior, by hand)', () => {
		const { expected } = referenceCase<unknown, { posteriorMeanSurvival: number }>(
			'00_checks.json',
			'j2'
		);
		const learnt = learnYield(PRIOR, { previous: 40, today: 35, kept: 33, gapDays: 1 });
		expect(yieldOf(learnt).survival).toBeCloseTo(expected.posteriorMeanSurvival, 12);
		// Two new in one day on top of Gamma(2, 1.5).
		expect(yieldOf(learnt).arrivals).toBeCloseTo(4 / 2.5, 12);
	});

	it('nears the truth on many days, matched or not, with or without gaps', () => {
		for (const isMatched of [true, false]) {
			for (const gapDays of [1, 3]) {
				const random = seeded(gapDays, isMatched ? 'matched' : 'totals');
				const bundle = simulatedBundle(usual, random);
				let baseline: Baseline = PRIOR;
				for (let step = 0; step < 3000; step++) {
					const previous = bundle.units;
					simulateDay(bundle, overGap(usual, gapDays), 0, random);
					const kept = bundle.kept;
					const today = bundle.units;
					baseline = learnYield(baseline, {
						previous,
						today,
						kept: isMatched ? kept : null,
						gapDays
					});
				}
				// Survival over gaps is read off daily pseudo-counts, which is rougher.
				const rough = gapDays === 1 ? 0.03 : 0.06;
				expect(Math.abs(yieldOf(baseline).survival - 0.8)).toBeLessThan(rough);
				expect(Math.abs(stationaryMean(yieldOf(baseline)) - 6)).toBeLessThan(0.8);
			}
		}
	});

	it('learns the level of the amplitude by generalised least squares (worked by hand)', () => {
		// First day alone: precision (1 − φ²)/σ² = 64; then e = 5 − .6·4 = 2.6 with (1 − φ)²/σ² = 16
		// and (1 − φ)e/σ² = 104: level (64·4 + 104)/80 = 4.5.
		const first = learnLevel(PRIOR, NaN, 4, 1, AMPLITUDE);
		const second = learnLevel(first, 4, 5, 1, AMPLITUDE);
		expect(levelOf(first).mean).toBeCloseTo(4, 12);
		expect(levelOf(first).variance).toBeCloseTo(1 / 64, 12);
		expect(levelOf(second).mean).toBeCloseTo(4.5, 12);
		expect(levelOf(second).variance).toBeCloseTo(1 / 80, 12);
		expect(learnLevel(second, 5, NaN, 1, AMPLITUDE)).toBe(second);
		expect(levelOf(PRIOR).mean).toBeNaN();
	});
});

describe('fall chart', () => {
	const days = [6, 7, 6, 5, 6, 6, 5, 6, 6, 2, 1, 0].map((units, day) => ({
		day,
		units,
		kept: null,
		lnAmplitude: NaN
	}));
	const follow = (seen: typeof days, settings = FALL_SETTINGS) =>
		seen.reduce((state, day) => nextFall(state, day, settings), startFall(settings));

	it('is quiet while the prior weighs most, and rises with a fall', () => {
		expect(fallStatistic(follow(days.slice(0, 5)))).toBe(0);
		expect(fallStatistic(follow(days.slice(0, 9)))).toBeLessThan(1);
		expect(fallStatistic(follow(days))).toBeGreaterThan(4);
	});

	it('shows the best supported of the falls looked for', () => {
		const state = follow(days);
		expect(state.sums).toHaveLength(2);
		expect(fallStatistic(state)).toBe(Math.max(...state.sums));
	});

	it('judges a day before it learns from it, and stops learning', () => {
		const settings = { ...FALL_SETTINGS, learnDays: 9 };
		const before = follow(days.slice(0, 9), settings);
		const after = nextFall(before, days[9], settings);
		expect(after.baseline).toBe(before.baseline);
		const model = yieldOf(before.baseline);
		const step = { previous: 6, today: 2, kept: null, gapDays: 1 };
		const evidence = fallEvidence(step, model, fallenModel(model, FALLS[0]));
		expect(after.sums[0]).toBeCloseTo(before.sums[0] + evidence, 12);
		const learning = follow(days.slice(0, 9));
		expect(nextFall(learning, days[9]).sums).toEqual(after.sums);
		expect(nextFall(learning, days[9]).baseline).not.toEqual(learning.baseline);
	});

	it('spans days not recorded as one step', () => {
		const before = follow(days.slice(0, 9));
		const model = yieldOf(before.baseline);
		const after = nextFall(before, { ...days[9], day: 11 });
		const step = { previous: 6, today: 2, kept: null, gapDays: 3 };
		const evidence = fallEvidence(step, model, fallenModel(model, FALLS[0]));
		expect(after.sums[0]).toBeCloseTo(Math.max(0, before.sums[0] + evidence), 12);
	});

	it('compares with a day it passed over, which itself adds nothing', () => {
		const before = follow(days.slice(0, 9));
		const passed = passFall(before, days[9]);
		expect(passed.sums).toEqual(before.sums);
		expect(passed.recorded).toBe(before.recorded);
		expect(passed.last?.units).toBe(2);
	});

	it('leaves its earlier state alone and refuses days out of order', () => {
		const before = Object.freeze(follow(days.slice(0, 9)));
		nextFall(before, days[9]);
		expect(before).toEqual(follow(days.slice(0, 9)));
		expect(() => nextFall(before, days[8])).toThrow(RangeError);
	});
});
