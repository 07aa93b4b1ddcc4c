import { describe, expect, it } from 'vitest';
import { drawBinomial } from '../random/binomial-draw';
import { drawPoisson } from '../random/poisson-draw';
import { seeded } from '../random/seeded';
import { quantile } from '../statistics/quantile';
import { gainOf, regressionToTheMean, type PastAdvance } from './gain';
import { coinEffect, outcomesOf } from './outcomes';

const model = { survival: 0.8, arrivals: 1.2 };
const past = (change: number, over: Partial<PastAdvance> = {}): PastAdvance => ({
	um: 40,
	before: 2,
	after: 2 + change,
	model,
	chosenBy: 'person',
	...over
});

describe('gainOf', () => {
	const tenTimes = [0, 1, 2, 3, 4, 5, 6, 7, 8, 9].map((change) => past(change));

	it('shows median and 10 to 90 % of earlier advances of like step, from ten on', () => {
		const { n, seen } = gainOf(40, { units: 1, model }, tenTimes);
		expect(n).toBe(10);
		expect(seen?.median).toBe(4.5);
		expect(seen?.low).toBeCloseTo(0.9, 12);
		expect(seen?.high).toBeCloseTo(8.1, 12);
	});

	it('says "not known yet" below ten, and counts half to twice the step as like', () => {
		const with9 = [...tenTimes.slice(0, 9), past(3, { um: 80.1 }), past(3, { um: 19.9 })];
		expect(gainOf(40, { units: 1, model }, with9)).toMatchObject({ n: 9, seen: null });
		const with11 = [...tenTimes.slice(0, 9), past(3, { um: 80 }), past(3, { um: 20 })];
		expect(gainOf(40, { units: 1, model }, with11).n).toBe(11);
	});
});

describe('regressionToTheMean', () => {
	it('is what simulated stable bundles of that count do in three days', () => {
		const random = seeded(3);
		const changes = Float64Array.from({ length: 20_000 }, () => {
			let units = 1;
			for (let day = 0; day < 3; day++) {
				units = drawBinomial(units, 0.8, random) + drawPoisson(1.2, random);
			}
			return units - 1;
		});
		const got = regressionToTheMean([{ before: 1, model }]);
		expect([got.low, got.median, got.high]).toEqual(
			[0.1, 0.5, 0.9].map((q) => quantile(changes, q))
		);
	});

	it('lifts a low count, lowers a high one, and leaves the usual one', () => {
		const median = (before: number) => regressionToTheMean([{ before, model }]).median;
		expect(median(0)).toBeGreaterThan(1);
		expect(median(6)).toBe(0);
		expect(median(14)).toBeLessThan(-2);
	});

	it('mixes several bundles and refuses none', () => {
		const mixed = regressionToTheMean([
			{ before: 0, model },
			{ before: 14, model }
		]);
		expect(mixed.low).toBeLessThan(0);
		expect(mixed.high).toBeGreaterThan(0);
		expect(() => regressionToTheMean([])).toThrow(RangeError);
	});
});

describe('outcomesOf', () => {
	it('tells what people chose beside chance, and leaves the coin apart', () => {
		const moves = [past(4), past(2), past(9, { chosenBy: 'coin' })];
		expect(outcomesOf(moves)).toMatchObject({ n: 2, seen: { median: 3 } });
		expect(outcomesOf(moves).byChance).toEqual(regressionToTheMean([past(0)]));
		expect(outcomesOf([])).toEqual({ n: 0, seen: null, byChance: null });
	});
});

describe('coinEffect', () => {
	const trials = (today: number[], later: number[]) => [
		...today.map((change) => ({ isToday: true, change })),
		...later.map((change) => ({ isToday: false, change }))
	];

	it('is the difference of means with the interval of Welch (scipy.stats.ttest_ind)', () => {
		const effect = coinEffect(trials([3, 5, 2, 4, 6, 3], [1, 2, 0, 3, 1]));
		expect(effect).toMatchObject({ today: 6, later: 5 });
		expect(effect?.difference).toBeCloseTo(2.4333333333333336, 10);
		expect(effect?.low).toBeCloseTo(0.6497784694011484, 8);
		expect(effect?.high).toBeCloseTo(4.216888197265519, 8);
	});

	it('says nothing below five on a side, and has no width when nothing varies', () => {
		expect(coinEffect(trials([3, 5, 2, 4], [1, 2, 0, 3, 1]))).toBeNull();
		const flat = coinEffect(trials([2, 2, 2, 2, 2], [1, 1, 1, 1, 1]));
		expect(flat).toMatchObject({ difference: 1, low: 1, high: 1 });
	});
});
