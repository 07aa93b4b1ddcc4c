import { describe, expect, it } from 'vitest';
import { modelOf, posteriorsOf, sparse } from '../../../../tests/factories/decoding';
import { worstDifference } from '../../../../tests/factories/reference';
import { binsOf } from '../arena/bins';
import { parseArena } from '../arena/parse-arena';
import { posteriorMean } from './posterior-mean';
import { LEAST_RATE_HZ, rateModel } from './rate-model';
import { silentShare } from './silent-share';

describe('priors of rateModel', () => {
	const rates = [
		[10, 2, 6, 4],
		[1, 5, 3, 9]
	];

	it('take weights that somebody gave, up to their scale', () => {
		const drawn = Float64Array.of(2, 0, 6, 8);
		const kept = drawn.slice();
		const model = modelOf(rates, [1, 1, 0, 1], drawn);
		// The third bin was never visited and the second has no weight: neither can be answered.
		expect([...model.bin]).toEqual([0, 3]);
		expect([...model.placeOfBin]).toEqual([0, -1, -1, 1]);
		expect(worstDifference(model.logPrior.map(Math.exp), [0.2, 0.8])).toBeLessThan(1e-15);
		expect(drawn).toEqual(kept);
	});

	it('given as the time spent equal the prior of that name (hand-worked, .8 and .2)', () => {
		const two = [
			[10, 2],
			[1, 5]
		];
		const occupancyS = [8, 2];
		const named = posteriorsOf(modelOf(two, occupancyS, 'time-spent'), [[0, 0]], 0.25);
		const given = posteriorsOf(modelOf(two, occupancyS, Float64Array.of(8, 2)), [[0, 0]], 0.25);
		expect(given).toEqual(named);
		expect(worstDifference(given[0], [0.5953903248083104, 0.40460967519168967])).toBeLessThan(1e-9);
	});

	it('are refused when negative, not finite, all zero or of another arena', () => {
		for (const odd of [
			[1, -1, 1, 1],
			[1, NaN, 1, 1],
			[1, Infinity, 1, 1],
			[0, 0, 0, 0],
			[1, 1]
		]) {
			expect(() => modelOf(rates, [1, 1, 1, 1], Float64Array.from(odd))).toThrow(RangeError);
		}
	});

	it('leave no model when all their weight lies where the animal never was', () => {
		const weights = Float64Array.of(0, 0, 1, 0);
		const model = rateModel(
			Float64Array.from(rates.flat()),
			Float64Array.of(1, 1, 0, 1),
			() => true,
			weights
		);
		expect(model).toBeNull();
	});
});

describe('few units', () => {
	it('none at all leave the prior as it was', () => {
		const model = modelOf([], [3, 1, 0, 4], 'time-spent');
		expect(model.units).toBe(0);
		const [posterior] = posteriorsOf(model, [[]], 0.25);
		expect(worstDifference(posterior, [0.375, 0.125, 0, 0.5])).toBeLessThan(1e-15);
	});

	it('one silent unit speaks for where it rarely fires, one spike for its map', () => {
		const model = modelOf([[8, 2]], [1, 1]);
		const [silent, spike] = posteriorsOf(model, [[0], [1]], 0.25);
		// Hand-worked: odds e^(−8/4) : e^(−2/4), and four times that after a spike.
		expect(silent[0]).toBeCloseTo(1 / (1 + Math.exp(1.5)), 14);
		expect(spike[0]).toBeCloseTo(4 / (4 + Math.exp(1.5)), 14);
	});

	it('cannot veto a place by one stray spike', () => {
		const model = modelOf([[0, 20]], [1, 1]);
		expect(model.ratesHz[0]).toBe(LEAST_RATE_HZ);
		const [posterior] = posteriorsOf(model, [[1]], 0.25);
		expect(posterior[0]).toBeGreaterThan(0);
	});
});

describe('silentShare', () => {
	it('is the share of windows in which nothing fired', () => {
		expect(
			silentShare(
				sparse([
					[0, 0],
					[1, 0],
					[0, 0],
					[0, 3]
				])
			)
		).toBe(0.5);
		expect(silentShare(sparse([]))).toBeNaN();
	});
});

describe('posteriorMean', () => {
	it('is the centre of mass on a track and in the open (hand-worked)', () => {
		const track = parseArena('straight:40');
		const onTrack = posteriorMean([0.5, 0, 0, 0.5], binsOf(track, 10), track);
		expect(onTrack).toEqual({ xCm: 20, yCm: NaN });
		const open = parseArena('rectangle:20x20');
		expect(posteriorMean([0, 0.25, 0, 0.75], binsOf(open, 10), open)).toEqual({
			xCm: 15,
			yCm: 12.5
		});
	});

	it('joins the seam of a ring, and is undefined where all directions cancel', () => {
		const ring = parseArena('ring:40');
		const bins = binsOf(ring, 10);
		expect(posteriorMean([0.5, 0, 0, 0.5], bins, ring).xCm % 40).toBeCloseTo(0, 9);
		expect(posteriorMean([0.75, 0, 0, 0.25], bins, ring).xCm).toBeGreaterThan(0);
		expect(posteriorMean([0.75, 0, 0, 0.25], bins, ring).xCm).toBeLessThan(5);
		expect(posteriorMean([0.25, 0.25, 0.25, 0.25], bins, ring).xCm).toBeNaN();
	});

	it('has no meaning on a branched maze or without any probability', () => {
		const maze = parseArena('tree:0,0>60,0;60,0>60,80;60,0>120,0');
		const bins = binsOf(maze, 10);
		expect(posteriorMean(new Float64Array(bins.count).fill(0.1), bins, maze).xCm).toBeNaN();
		const track = parseArena('straight:40');
		expect(posteriorMean([0, 0, 0, 0], binsOf(track, 10), track).xCm).toBeNaN();
		expect(() => posteriorMean([1], binsOf(track, 10), track)).toThrow(RangeError);
	});
});
