import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { PRIOR, yieldOf } from '../trends/bundle-baseline';
import { commonCause, shownFall } from './common-cause';
import { errorRates } from './error-rates';
import { landmarkPlace } from './landmark-place';
import { ADVICE_DEFAULTS } from './parameters';
import { settledAtH } from './settled';
import { thresholdSource } from './thresholds';
import { bestWorth, worthFall } from './worth';

const model = { survival: 0.8, arrivals: 1.2 };

describe('landmarkPlace', () => {
	const signs = { isPositiveUp: true, ripples: 3 };

	it('reads positive sharp waves as above the cell layer, negative ones as below', () => {
		expect(landmarkPlace({ ...signs, sharpWave: 'up' })).toBe('above');
		expect(landmarkPlace({ ...signs, sharpWave: 'down' })).toBe('below');
	});

	it('turns round with the sign convention', () => {
		expect(landmarkPlace({ ...signs, isPositiveUp: false, sharpWave: 'up' })).toBe('below');
		expect(landmarkPlace({ ...signs, isPositiveUp: false, sharpWave: 'down' })).toBe('above');
	});

	it('takes flat sharp waves with clear ripples for the layer, otherwise for nothing', () => {
		expect(landmarkPlace({ ...signs, sharpWave: 'flat' })).toBe('in');
		expect(landmarkPlace({ ...signs, sharpWave: 'flat', ripples: 2 })).toBe('in');
		expect(landmarkPlace({ ...signs, sharpWave: 'flat', ripples: 1 })).toBe('unclear');
		expect(landmarkPlace({ ...signs, sharpWave: 'flat', ripples: null })).toBe('unclear');
		expect(landmarkPlace({ ...signs, sharpWave: null })).toBe('unclear');
	});
});

describe('worth of a bundle', () => {
	const worth = (day: number, arena: string, bits: number) => ({
		day,
		arena,
		bits,
		low: bits - 0.01,
		high: bits + 0.01
	});
	const worths = [worth(4, 'square', 0.3), worth(6, 'square', 0.05), worth(7, 'circle', 0.1)];

	it('is the latest of each arena, and of these the best', () => {
		expect(bestWorth(worths, 8, 5)).toBe(worths[2]);
		expect(bestWorth(worths.toReversed(), 8, 5)).toBe(worths[2]);
		expect(bestWorth(worths, 5, 5)).toBe(worths[0]);
	});

	it('is unknown when nothing was decoded in the last days', () => {
		expect(bestWorth(worths, 11, 5)).toBe(worths[2]);
		expect(bestWorth(worths, 12, 5)).toBeNull();
		expect(bestWorth([], 8, 5)).toBeNull();
	});

	it('fell by the difference to the days before', () => {
		expect(worthFall(worths, 9, 4)).toBeCloseTo(0.3 - 0.1, 12);
		expect(worthFall(worths, 20, 4)).toBeNaN();
	});
});

describe('settledAtH', () => {
	it('is the latest end of the rests, of moves made so far', () => {
		const moves = [
			{ atH: 10, day: 0, um: 160 },
			{ atH: 20, day: 0, um: -40 },
			{ atH: 90, day: 3, um: 40 }
		];
		expect(settledAtH(moves, 30, ADVICE_DEFAULTS)).toBe(34);
		expect(settledAtH(moves, 100, ADVICE_DEFAULTS)).toBe(102);
		expect(settledAtH([], 100, ADVICE_DEFAULTS)).toBe(-Infinity);
	});
});

describe('common cause', () => {
	it('shows a fall beyond two conditional standard deviations (worked by hand)', () => {
		// 6 yesterday: mean 6, variance 2.16, limit 6 − 2·1.47 = 3.06.
		const step = { model, previous: 6, gapDays: 1 };
		expect(shownFall({ ...step, today: 3 }, ADVICE_DEFAULTS)).toEqual({
			isAble: true,
			hasFallen: true
		});
		expect(shownFall({ ...step, today: 4 }, ADVICE_DEFAULTS).hasFallen).toBe(false);
	});

	it('leaves out bundles that silence would not surprise', () => {
		// 2 yesterday: P(0) = .2² e^−1.2 = .012 but the limit is 2.8 − 2·1.23 = .34 > 0: just able.
		expect(shownFall({ model, previous: 2, today: 0, gapDays: 1 }, ADVICE_DEFAULTS).isAble).toBe(
			true
		);
		expect(shownFall({ model, previous: 1, today: 0, gapDays: 1 }, ADVICE_DEFAULTS).isAble).toBe(
			false
		);
	});

	it('is common from 40 % of at least four', () => {
		expect(commonCause(5, 2, ADVICE_DEFAULTS)).toMatchObject({ share: 0.4, isCommon: true });
		expect(commonCause(5, 1, ADVICE_DEFAULTS).isCommon).toBe(false);
		expect(commonCause(3, 3, ADVICE_DEFAULTS)).toMatchObject({ share: NaN, isCommon: false });
	});
});

describe('thresholdSource', () => {
	const quick = { ...ADVICE_DEFAULTS, watchRunDays: 20, advanceRunDays: 60 };

	it('gives the same limits whatever was asked before', () => {
		const first = thresholdSource(quick);
		const second = thresholdSource(quick);
		second({ survival: 0.7, arrivals: 2 }, 'kept-new');
		expect(second(model, 'kept-new')).toEqual(first(model, 'kept-new'));
		expect(second(model, 'kept-new')).toBe(second({ ...model, survival: 0.81 }, 'kept-new'));
	});

	it('watches before it advances, and differs with the evidence and the seed', () => {
		const source = thresholdSource(quick);
		const { watchAt, advanceAt } = source(yieldOf(PRIOR), 'totals');
		expect(watchAt).toBeLessThan(advanceAt);
		const other = thresholdSource({ ...quick, seed: 2 });
		expect(other(yieldOf(PRIOR), 'totals').advanceAt).not.toBe(advanceAt);
		expect(source(yieldOf(PRIOR), 'kept-new-amplitude').advanceAt).not.toBe(advanceAt);
	});

	it('serves bundles at the edge of any model', () => {
		const source = thresholdSource(quick);
		for (const edge of [
			{ survival: 0.001, arrivals: 0.01 },
			{ survival: 0.999, arrivals: 0.05 }
		]) {
			expect(source(edge, 'totals').advanceAt).toBeGreaterThan(0);
		}
	});
});

describe('errorRates', () => {
	const thresholds = () => ({ watchAt: 2.8, advanceAt: 5.1 });
	const question = {
		model,
		kind: 'kept-new-amplitude',
		bundles: 16,
		recordedDaysAWeek: 6,
		collapseADay: 1 / 60
	} as const;
	const rates = (over: object = {}, seed = 1) =>
		errorRates({ ...question, ...over }, ADVICE_DEFAULTS, thresholds, seeded(seed), 150);

	it('has more right advances than false ones at the usual limits', () => {
		const got = rates();
		expect(got.rightShare).toBeGreaterThan(0.7);
		expect(got.falseAdvances).toBeLessThan(0.3);
		expect(got.falseWatches).toBeGreaterThan(got.falseAdvances);
		expect(got.medianDelayDays).toBeGreaterThanOrEqual(3);
		expect(got.medianDelayDays).toBeLessThanOrEqual(8);
	});

	it('grows with the bundles and the days, and repeats itself for a seed', () => {
		expect(rates()).toEqual(rates());
		expect(rates({ bundles: 32 }).rightAdvances).toBeCloseTo(2 * rates().rightAdvances, 10);
		expect(rates({ bundles: 0 }).falseAdvances).toBe(0);
	});

	it('has only false ones where nothing collapses, and no delay to tell', () => {
		const got = rates({ collapseADay: 0 });
		expect(got.rightAdvances).toBe(0);
		expect(got.medianDelayDays).toBeNaN();
		expect(() => rates({ collapseADay: 2 })).toThrow(RangeError);
	});
});
