import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { calibration } from './calibration';
import { credibleSetSize, isInCredibleSet } from './credible-set';
import { decodedAgainstTrue } from './decoded-against-true';
import { errorByPlace } from './error-by-place';
import { logScore } from './log-score';

describe('isInCredibleSet', () => {
	it('grows by the most probable place first (hand-worked)', () => {
		const p = Float64Array.of(0.5, 0.3, 0.15, 0.05);
		const setAt = (level: number) => [0, 1, 2, 3].filter((k) => isInCredibleSet(p, k, level));
		expect([0.5, 0.8, 0.9, 0.96].map(setAt)).toEqual([[0], [0, 1], [0, 1, 2], [0, 1, 2, 3]]);
	});

	it('has the coverage and size that sorting gives (numpy)', () => {
		const { input, expected } = referenceCase<
			{ posterior: number[][]; trueBin: number[]; levels: number[] },
			{ coverage: number[]; meanSetSize: number[] }
		>('09_error_metrics.json', 'hpd_calibration');
		const rows = input.posterior.map((row) => Float64Array.from(row));
		const share = (level: number) =>
			rows.filter((row, w) => isInCredibleSet(row, input.trueBin[w], level)).length / rows.length;
		const size = (level: number) =>
			rows.reduce(
				(sum, row) => sum + row.filter((_, k) => isInCredibleSet(row, k, level)).length,
				0
			) / rows.length;
		expect(worstDifference(input.levels.map(share), expected.coverage)).toBeLessThan(1e-9);
		expect(worstDifference(input.levels.map(size), expected.meanSetSize)).toBeLessThan(1e-9);
	});
});

describe('calibration', () => {
	it('gives coverage, size and gap of the sets at every level (numpy)', () => {
		const { input, expected } = referenceCase<
			{ posterior: number[][]; trueBin: number[]; levels: number[] },
			{ coverage: number[]; meanSetSize: number[]; meanAbsGap: number }
		>('09_error_metrics.json', 'hpd_calibration');
		const rows = Float64Array.from(input.posterior.flat());
		const before = rows.slice();
		const told = calibration(rows, Int32Array.from(input.trueBin), input.levels);
		expect(worstDifference(told.coverage, expected.coverage)).toBeLessThan(1e-9);
		expect(worstDifference(told.meanSetBins, expected.meanSetSize)).toBeLessThan(1e-9);
		expect(told.meanGap).toBeCloseTo(expected.meanAbsGap, 9);
		expect(rows).toEqual(before);
	});

	it('covers as the level says when places are drawn from the posteriors, and less when too sure', () => {
		const random = seeded(12);
		const windows = 4000;
		const honest = new Float64Array(windows * 30);
		const sure = new Float64Array(windows * 30);
		const trueBin = new Int32Array(windows);
		for (let w = 0; w < windows; w++) {
			const weights = Array.from({ length: 30 }, () => random.next() ** 4);
			const total = weights.reduce((a, b) => a + b, 0);
			const sharp = weights.reduce((a, b) => a + b ** 3, 0);
			let left = random.next() * total;
			trueBin[w] = weights.findIndex((weight) => (left -= weight) < 0);
			weights.forEach((weight, k) => {
				honest[w * 30 + k] = weight / total;
				sure[w * 30 + k] = weight ** 3 / sharp;
			});
		}
		const told = calibration(honest, trueBin);
		const toldSure = calibration(sure, trueBin);
		told.levels.forEach((level, l) => {
			// A set of whole bins reaches a little past its level; four standard errors below.
			expect(told.coverage[l]).toBeGreaterThan(
				level - 4 * Math.sqrt((level * (1 - level)) / windows)
			);
			expect(told.coverage[l]).toBeLessThan(level + 0.08);
			expect(toldSure.coverage[l]).toBeLessThan(told.coverage[l] - 0.05);
		});
	});

	it('counts a window whose true bin cannot be answered as not covered, and says how many', () => {
		const told = calibration(Float64Array.of(0, 1, 0, 1, 0.5, 0.5), Int32Array.of(0, 1, -1), [0.9]);
		expect(told).toMatchObject({ windows: 3, unscorable: 2 });
		expect(told.coverage[0]).toBeCloseTo(1 / 3, 15);
	});

	it('is undefined without windows and refuses what does not fit', () => {
		expect(calibration(new Float64Array(0), new Int32Array(0)).coverage[0]).toBeNaN();
		expect(() => calibration(new Float64Array(5), new Int32Array(2))).toThrow(RangeError);
		expect(() => calibration(new Float64Array(2), new Int32Array(1), [1])).toThrow(RangeError);
	});
});

describe('credibleSetSize', () => {
	it('is the number of places that isInCredibleSet lets in, ties included', () => {
		const random = seeded(4);
		for (let round = 0; round < 200; round++) {
			const weights = Float64Array.from({ length: 12 }, () => 1 + random.below(4));
			const total = weights.reduce((a, b) => a + b, 0);
			const p = weights.map((weight) => weight / total);
			const level = 0.02 + 0.97 * random.next();
			const inside = p.filter((_, k) => isInCredibleSet(p, k, level)).length;
			expect(credibleSetSize(p.slice().sort(), level)).toBe(inside);
		}
	});
});

describe('decodedAgainstTrue', () => {
	it('gives rows that sum to one and leaves places never visited undefined (hand-worked)', () => {
		const matrix = decodedAgainstTrue(
			Int32Array.of(0, 0, 0, 0, 2, -1, 2),
			Int32Array.of(0, 0, 1, 2, 2, 0, -1),
			3
		);
		expect([...matrix]).toEqual([0.5, 0.25, 0.25, NaN, NaN, NaN, 0, 0, 1]);
	});

	it('refuses lengths that differ and more cells than it has room for', () => {
		expect(() => decodedAgainstTrue(new Int32Array(1), new Int32Array(2), 2)).toThrow(RangeError);
		expect(() => decodedAgainstTrue(new Int32Array(0), new Int32Array(0), 4000)).toThrow(
			RangeError
		);
	});
});

describe('errorByPlace', () => {
	it('gives median and quartiles of each cell (type 7, hand-worked)', () => {
		const told = errorByPlace(
			Float64Array.of(3, 9, 1, 5, NaN, 7, 2),
			Int32Array.of(0, 2, 0, 0, 0, -1, 0),
			3
		);
		expect([...told.windows]).toEqual([4, 0, 1]);
		expect([...told.medianCm]).toEqual([2.5, NaN, 9]);
		expect([...told.lowerQuartileCm]).toEqual([1.75, NaN, 9]);
		expect([...told.upperQuartileCm]).toEqual([3.5, NaN, 9]);
	});

	it('refuses lengths that differ', () => {
		expect(() => errorByPlace(new Float64Array(2), new Int32Array(1), 1)).toThrow(RangeError);
	});
});

describe('logScore', () => {
	it('leaves unscorable windows out of the mean and counts them', () => {
		expect(logScore(Float64Array.of(-1, NaN, -3, -Infinity))).toEqual({
			meanBits: -2,
			scored: 2,
			unscorable: 2
		});
	});

	it('is undefined when nothing can be scored', () => {
		expect(logScore(Float64Array.of(NaN)).meanBits).toBeNaN();
	});
});
