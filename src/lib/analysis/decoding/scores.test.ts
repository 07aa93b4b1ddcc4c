import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { shuffled } from '../random/shuffled';
import { decodeWithoutBundles, everyWindow } from './bundle-worth';
import { chanceMedian } from './chance';
import { errorSummary } from './error-summary';
import { foldsOf } from './folds';
import { rateModel } from './rate-model';
import { decodeSubsets, subsetSizes } from './unit-drop';
import { windowCounts } from './window-counts';
import { windowsOf } from './windows';

describe('errorSummary', () => {
	it('is right on eight errors (hand-worked)', () => {
		const told = errorSummary(Float64Array.of(3, 1, 4, 1, 5, 9, 2, 6));
		expect(told).toMatchObject({ medianCm: 3.5, meanCm: 3.875, fractionWithin10Cm: 1 });
		expect(told.p95Cm).toBeCloseTo(7.95, 12);
	});

	it('equals numpy', () => {
		const { input, expected } = referenceCase<
			{ absErrorCm: number[] },
			{ median: number; mean: number; p95: number; fracWithin10: number }
		>('09_error_metrics.json', 'error_summary');
		const told = errorSummary(Float64Array.from(input.absErrorCm));
		const got = [told.medianCm, told.meanCm, told.p95Cm, told.fractionWithin10Cm];
		const { median, mean, p95, fracWithin10 } = expected;
		expect(worstDifference(got, [median, mean, p95, fracWithin10])).toBeLessThan(1e-9);
	});

	it('is NaN without errors', () => {
		expect(errorSummary(new Float64Array(0)).medianCm).toBeNaN();
	});
});

describe('chanceMedian', () => {
	it('comes near L(1 − 1/√2) for answers that know nothing (closed form)', () => {
		const random = seeded(4);
		const answers = Array.from({ length: 20_000 }, () => 180 * random.next());
		const places = answers.map(() => 180 * random.next());
		const got = chanceMedian(answers.length, (a, b) => Math.abs(answers[a] - places[b]));
		expect(Math.abs(got - 52.720779)).toBeLessThan(0.5);
	});

	it('is undefined for a handful of windows', () => {
		expect(chanceMedian(19, () => 1)).toBeNaN();
	});
});

describe('windows and folds', () => {
	const tS = Float64Array.from({ length: 100 }, (_, i) => 10 + i * 0.1);
	const standS = new Float64Array(100).fill(0.1);

	it('lie side by side from the first sample and need a used sample at their middle', () => {
		const isUsed = new Uint8Array(100).fill(1).fill(0, 5, 10);
		const windows = windowsOf(tS, standS, new Int32Array(100), isUsed, 0.5);
		expect(windows.startS.length).toBe(18);
		expect([...windows.startS.subarray(0, 2)]).toEqual([10, 11]);
		expect([...windows.sample.subarray(0, 2)]).toEqual([2, 12]);
	});

	it('count a spike at a start and not one at an end', () => {
		const windows = { lengthS: 0.5, startS: Float64Array.of(0, 0.5, 2), sample: new Int32Array(3) };
		const counts = windowCounts(windows, [
			Float64Array.of(0, 0.4, 0.5, 1, 2.5),
			Float64Array.of(2.1)
		]);
		expect([...counts.first]).toEqual([0, 1, 2, 3]);
		expect([...counts.unit]).toEqual([0, 0, 1]);
		expect([...counts.spikes]).toEqual([2, 1, 1]);
	});

	it('are cut into contiguous folds whose sizes differ by one at most', () => {
		const windows = {
			lengthS: 1,
			startS: Float64Array.from({ length: 23 }, (_, i) => i),
			sample: new Int32Array(23)
		};
		const folds = foldsOf(windows, 10);
		expect(folds.map(({ from, to }) => to - from)).toEqual([3, 3, 3, 2, 2, 2, 2, 2, 2, 2]);
		expect(folds[1]).toEqual({ from: 3, to: 6, startS: 3, stopS: 6 });
	});
});

describe('what units and bundles are worth', () => {
	const random = seeded(8);
	const rates = Array.from({ length: 7 }, () =>
		Array.from({ length: 12 }, () => 15 * random.next())
	);
	const even = new Float64Array(12).fill(1);
	const build = (units: readonly number[]) => {
		const model = rateModel(
			Float64Array.from(units.flatMap((u) => rates[u])),
			even,
			() => true,
			'even'
		);
		if (!model) throw new Error('no model');
		return model;
	};
	const startS = Float64Array.from({ length: 30 }, (_, w) => w);
	const windows = { lengthS: 1, startS, sample: new Int32Array(30) };
	const spikes = rates.map(() =>
		Float64Array.from({ length: 60 }, () => 30 * random.next()).sort()
	);
	const folds = foldsOf(windows, 3);
	const trueBin = Int32Array.from(startS, (_, w) => w % 12);
	const looked = everyWindow(30, 1);
	const of = (units: readonly number[]) => ({
		models: folds.map(() => build(units)),
		counts: windowCounts(
			windows,
			units.map((u) => spikes[u])
		)
	});
	/** ln-posterior straight from the definition. */
	const direct = (units: readonly number[], w: number) => {
		const logs = Array.from({ length: 12 }, (_, k) =>
			units.reduce((sum, u) => {
				const n = spikes[u].filter((t) => t >= w && t < w + 1).length;
				return sum + n * Math.log(rates[u][k]) - rates[u][k];
			}, 0)
		);
		const top = Math.max(...logs);
		const total = top + Math.log(logs.reduce((sum, l) => sum + Math.exp(l - top), 0));
		return { best: logs.indexOf(top), log2AtTrue: (logs[trueBin[w]] - total) / Math.LN2 };
	};
	const all = [0, 1, 2, 3, 4, 5, 6];

	it('leaving out a bundle by subtraction equals decoding without its units', () => {
		const { models, counts } = of(all);
		const bundleOf = Int32Array.of(0, 1, 1, -1, 0, 2, 2);
		const without = decodeWithoutBundles(models, folds, counts, 1, trueBin, bundleOf, 3, looked);
		for (let b = 0; b < 3; b++) {
			const rest = all.filter((u) => bundleOf[u] !== b);
			const want = looked.map((w) => direct(rest, w).best);
			const bits = Array.from(
				looked,
				(w) => direct(all, w).log2AtTrue - direct(rest, w).log2AtTrue
			);
			expect([...without.bin[b]]).toEqual([...want]);
			expect(worstDifference(without.bits[b], bits)).toBeLessThan(1e-9);
		}
	});

	it('growing subsets along one order equals decoding each subset', () => {
		const { models, counts } = of(all);
		const order = shuffled(7, seeded(3));
		const sizes = subsetSizes(7);
		expect(sizes).toEqual([1, 2, 4, 7]);
		const answers = decodeSubsets(models, folds, counts, 1, order, sizes, looked);
		sizes.forEach((size, s) => {
			const subset = [...order.subarray(0, size)];
			expect([...answers[s]]).toEqual([...looked.map((w) => direct(subset, w).best)]);
		});
	});

	it('looks at evenly spaced windows when all would cost too much', () => {
		expect([...everyWindow(10, 5e7)]).toEqual([0, 3, 6, 9]);
	});
});
