import { describe, expect, it } from 'vitest';
import { blockFolds } from './block-folds';
import { withGap } from './fold-gap';
import { foldModels } from './fold-models';
import { foldsOf } from './folds';
import { lapFolds } from './lap-folds';
import type { Windows } from './windows';

/** Windows of 1 s, one sample each. */
const windowsAt = (startS: readonly number[]): Windows => ({
	lengthS: 1,
	startS: Float64Array.from(startS),
	sample: Int32Array.from(startS.keys())
});
const upTo = (count: number) => Array.from({ length: count }, (_, i) => i);
const ranges = (folds: readonly { from: number; to: number }[]) =>
	folds.map(({ from, to }) => [from, to]);

describe('lapFolds', () => {
	it('leave out one whole lap at a time', () => {
		const folds = lapFolds(windowsAt([0, 1, 2, 10, 11, 20]), Int32Array.of(0, 0, 0, 1, 1, 2));
		expect(folds).toEqual([
			{ from: 0, to: 3, startS: 0, stopS: 3 },
			{ from: 3, to: 5, startS: 10, stopS: 12 },
			{ from: 5, to: 6, startS: 20, stopS: 21 }
		]);
	});

	it('are as many as wanted, of laps in the order they were run, larger ones first', () => {
		const lap = Int32Array.from(upTo(22), (w) => Math.floor(w / 2));
		expect(ranges(lapFolds(windowsAt(upTo(22)), lap, 4))).toEqual([
			[0, 6],
			[6, 12],
			[12, 18],
			[18, 22]
		]);
		expect(lapFolds(windowsAt(upTo(22)), lap, 40).length).toBe(11);
	});

	it('keep laps together that lie in each other', () => {
		const lap = Int32Array.of(0, 0, 1, 0, 1, 2, 2, 3);
		expect(ranges(lapFolds(windowsAt(upTo(8)), lap))).toEqual([
			[0, 5],
			[5, 7],
			[7, 8]
		]);
	});

	it('take windows without a lap along with those before, at the beginning with those after', () => {
		const lap = Int32Array.of(-1, 0, -1, 1, 1, -1);
		expect(ranges(lapFolds(windowsAt(upTo(6)), lap))).toEqual([
			[0, 3],
			[3, 6]
		]);
	});

	it('always cover every window once, with no lap on both sides', () => {
		const lap = Int32Array.from(upTo(200), (w) => Math.floor(w / 7) - (w % 31 === 0 ? 1 : 0));
		for (const wanted of [null, 2, 5, 10]) {
			const folds = lapFolds(windowsAt(upTo(200)), lap, wanted);
			expect(folds[0].from).toBe(0);
			expect(folds[folds.length - 1].to).toBe(200);
			folds.slice(1).forEach((fold, f) => expect(fold.from).toBe(folds[f].to));
			const seen = folds.map(({ from, to }) => new Set(lap.subarray(from, to)));
			seen.forEach((a, f) =>
				seen.slice(f + 1).forEach((b) => expect([...a].some((k) => k >= 0 && b.has(k))).toBe(false))
			);
		}
	});

	it('are none with a single lap or no windows, and refuse a number that cuts nothing', () => {
		expect(lapFolds(windowsAt(upTo(5)), new Int32Array(5))).toEqual([]);
		expect(lapFolds(windowsAt([]), new Int32Array(0))).toEqual([]);
		for (const wanted of [1, 2.5, NaN]) {
			expect(() => lapFolds(windowsAt(upTo(5)), new Int32Array(5), wanted)).toThrow(RangeError);
		}
	});
});

describe('blockFolds', () => {
	it('cut the clock into blocks of at least the length, the rest joining the last', () => {
		expect(ranges(blockFolds(windowsAt(upTo(75)), 20))).toEqual([
			[0, 20],
			[20, 40],
			[40, 75]
		]);
		expect(ranges(blockFolds(windowsAt([0, 1, 5, 100, 101, 119, 130]), 20))).toEqual([
			[0, 3],
			[3, 7]
		]);
	});

	it('are none when the windows do not last for two blocks, and refuse short ones', () => {
		expect(blockFolds(windowsAt(upTo(39)), 20)).toEqual([]);
		expect(blockFolds(windowsAt([]))).toEqual([]);
		for (const blockS of [19, NaN, Infinity]) {
			expect(() => blockFolds(windowsAt(upTo(50)), blockS)).toThrow(RangeError);
		}
	});
});

describe('withGap', () => {
	const folds = foldsOf(windowsAt(upTo(30)), 3);

	it('keeps a gap on both sides of each test block from the training data', () => {
		const wide = withGap(folds, 1.5);
		expect(ranges(wide)).toEqual(ranges(folds));
		expect(wide[1]).toEqual({ from: 10, to: 20, startS: 8.5, stopS: 21.5 });
		expect(folds[1]).toEqual({ from: 10, to: 20, startS: 10, stopS: 20 });
	});

	it('takes the samples next to a test block out of its maps', () => {
		const ratesHz = (list: typeof folds) =>
			foldModels(
				{
					bin: new Int32Array(30),
					standS: new Float64Array(30).fill(1),
					bins: 2,
					smooth: (from, to) => void to.set(from),
					minOccupancyS: 0.1
				},
				Float64Array.from(upTo(30)),
				new Uint8Array(30).fill(1),
				[Int32Array.of(8, 9)],
				list,
				'even'
			).map((model) => model?.ratesHz[0]);
		// Two spikes, 1 and 2 s before the second block: with a gap of 1.5 s one of them goes, and
		// 17 of 30 s remain.
		expect(ratesHz(folds)[1]).toBeCloseTo(2 / 20, 14);
		expect(ratesHz(withGap(folds, 1.5))[1]).toBeCloseTo(1 / 17, 14);
	});

	it('refuses a gap that is none', () => {
		for (const gapS of [-1, NaN, Infinity]) expect(() => withGap(folds, gapS)).toThrow(RangeError);
	});
});
