import { describe, expect, it } from 'vitest';
import { numbers, referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { binsOf } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { occupancyInto } from '../maps/occupancy';
import { seeded } from '../random/seeded';
import { cleanPath, SAMPLE_FLAGS } from './clean-path';
import { fillGaps } from './fill-gaps';
import { rejectJumps } from './jumps';
import { onUnwrapped } from './on-unwrapped';
import { smoothInTime } from './smooth-in-time';
import { standingTime } from './standing-time';

const clock = (n: number, dt = 0.1) => Float64Array.from({ length: n }, (_, i) => i * dt);
const zeros = (n: number) => new Float64Array(n);
const one = (n: number) => new Int32Array(n);
const line = metricOf(parseArena('straight:1000'));

function jumpsOf(x: number[], stretch = one(x.length), metric = line, fastest = 150): number[] {
	const n = x.length;
	const got = rejectJumps(clock(n), Float64Array.from(x), zeros(n), stretch, metric, fastest);
	return [...got];
}

describe('rejectJumps', () => {
	it('takes two opposite jumps in a row for one bad sample', () => {
		expect(jumpsOf([0, 1, 90, 3, 4])).toEqual([0, 0, 1, 0, 0]);
	});

	it('rejects an excursion of several samples whole, and one that hops about', () => {
		expect(jumpsOf([0, 1, 90, 91, 92, 3, 4])).toEqual([0, 0, 1, 1, 1, 0, 0]);
		expect(jumpsOf([0, 1, 90, 200, 3, 4])).toEqual([0, 0, 1, 1, 0, 0]);
	});

	it('rejects only the landing of a jump that never returns', () => {
		expect(jumpsOf([0, 1, 90, 91, 92, 93])).toEqual([0, 0, 1, 0, 0, 0]);
	});

	it('does not take a long stay elsewhere for an excursion', () => {
		const stay = [0, 1, 90, 90, 90, 90, 90, 90, 90, 3, 4];
		expect(jumpsOf(stay)).toEqual([0, 0, 1, 0, 0, 0, 0, 0, 0, 1, 0]);
	});

	it('keeps a step of exactly the fastest speed and rejects the next faster one', () => {
		expect(jumpsOf([0, 15, 30], one(3), line, 150)).toEqual([0, 0, 0]);
		expect(jumpsOf([0, 15.001, 15.002], one(3), line, 150)).toEqual([0, 1, 0]);
	});

	it('allows for the time that passed while the animal was not seen', () => {
		expect(jumpsOf([0, NaN, NaN, 40, 41])).toEqual([0, 0, 0, 0, 0]);
	});

	it('sees no jump over the seam of a ring, nor between two stretches', () => {
		const ring = metricOf(parseArena('ring:300'));
		expect(jumpsOf([290, 298, 4, 12], one(4), ring)).toEqual([0, 0, 0, 0]);
		expect(jumpsOf([0, 1, 90, 91], Int32Array.of(0, 0, 1, -1))).toEqual([0, 0, 0, 0]);
	});

	it('leaves a walk within the limit alone, whatever it does, and finds every lone spike in it', () => {
		const random = seeded(21);
		for (let round = 0; round < 20; round++) {
			let at = 0;
			const walk = Array.from({ length: 80 }, () => (at += 16 * random.next() - 8));
			expect(jumpsOf(walk)).toEqual(Array(80).fill(0));
			const bad = 1 + random.below(78);
			const hit = walk.map((x, i) => (i === bad ? x + 100 : x));
			expect(jumpsOf(hit)).toEqual(walk.map((_, i) => (i === bad ? 1 : 0)));
		}
	});

	it('refuses limits that are not above 0', () => {
		expect(() => jumpsOf([0, 1], one(2), line, 0)).toThrow(RangeError);
		expect(() => jumpsOf([0, 1], one(2), line, NaN)).toThrow(RangeError);
		expect(() => rejectJumps(clock(1), zeros(1), zeros(1), one(1), line, 150, 0)).toThrow(
			RangeError
		);
	});
});

describe('fillGaps', () => {
	it('equals numpy.interp inside short gaps and leaves long ones and both ends', () => {
		const { input, expected, tol } = referenceCase<
			{ t0: number; dt: number; x: (number | null)[]; maxGapS: number },
			{ x: (number | null)[] }
		>('01_position.json', 'gap_interpolation');
		const x = numbers(input.x);
		const tS = Float64Array.from(x, (_, i) => input.t0 + i * input.dt);
		const got = fillGaps(tS, x, one(x.length), input.maxGapS);
		expect(worstDifference(got, expected.x)).toBeLessThan(tol);
	});

	it('follows the clock, not the count of samples', () => {
		const got = fillGaps(Float64Array.of(0, 0.3, 0.4), Float64Array.of(0, NaN, 4), one(3));
		expect(got[1]).toBeCloseTo(3, 12);
	});

	it('never reaches into another stretch', () => {
		const x = Float64Array.of(0, NaN, 2, NaN, 4);
		expect([...fillGaps(clock(5), x, Int32Array.of(0, 0, 1, -1, 1))]).toEqual([0, NaN, 2, NaN, 4]);
	});

	it('leaves nothing known as it is, and its input too', () => {
		const x = Float64Array.of(1, NaN, 3);
		fillGaps(clock(3), x, one(3));
		expect([...x]).toEqual([1, NaN, 3]);
		expect([...fillGaps(clock(2), Float64Array.of(NaN, NaN), one(2))]).toEqual([NaN, NaN]);
		expect(() => fillGaps(clock(3), x, one(3), -1)).toThrow(RangeError);
	});

	it('goes over the seam of a ring the short way', () => {
		const x = Float64Array.of(296, NaN, NaN, 5);
		const got = onUnwrapped(x, 300, (run) => fillGaps(clock(4), run, one(4)));
		expect(worstDifference(got, [296, 299, 2, 5])).toBeLessThan(1e-9);
	});

	it('adds no occupancy where a gap stays open', () => {
		const bins = binsOf(parseArena('straight:100'), 50);
		const x = Float64Array.from({ length: 20 }, (_, i) => (i >= 5 && i < 15 ? NaN : 20));
		const filled = fillGaps(clock(20), x, one(20));
		const bin = Int32Array.from(filled, (value) => bins.of(value, NaN));
		const occupancyS = zeros(2);
		const standS = standingTime(clock(20), one(20), 0.1);
		occupancyInto(occupancyS, bin, standS, new Uint8Array(20).fill(1));
		expect(occupancyS[0]).toBeCloseTo(1, 9);
		expect(occupancyS[1]).toBe(0);
	});
});

describe('smoothInTime', () => {
	it('is the weighted mean, divided by the weights that lie inside the run (worked by hand)', () => {
		const w = Math.exp(-0.5);
		const w2 = Math.exp(-2);
		const got = smoothInTime(clock(3), Float64Array.of(0, 0, 6), one(3), 0.1);
		expect(got[0]).toBeCloseTo((6 * w2) / (1 + w + w2), 12);
		expect(got[1]).toBeCloseTo((6 * w) / (1 + 2 * w), 12);
		expect(got[2]).toBeCloseTo(6 / (1 + w + w2), 12);
	});

	it('keeps a constant everywhere and a steady run away from the ends', () => {
		const flat = smoothInTime(clock(50), new Float64Array(50).fill(7.3), one(50));
		expect(worstDifference(flat, Array(50).fill(7.3))).toBe(0);
		const steady = Float64Array.from({ length: 50 }, (_, i) => 2 * i);
		const got = smoothInTime(clock(50), steady, one(50));
		expect(worstDifference(got.slice(7, 43), [...steady.slice(7, 43)])).toBeLessThan(1e-9);
		expect(got[0]).toBeGreaterThan(0);
	});

	it('mixes nothing over an unknown sample or between stretches', () => {
		const x = Float64Array.of(0, 0, NaN, 90, 90, 10, 10, 55);
		const got = smoothInTime(clock(8), x, Int32Array.of(0, 0, 0, 0, 0, 1, 1, -1));
		expect([...got]).toEqual([...x]);
	});

	it('weighs by real time where samples come unevenly', () => {
		const got = smoothInTime(Float64Array.of(0, 0.05, 9), Float64Array.of(0, 1, 50), one(3), 0.1);
		expect(got[2]).toBe(50);
		const w = Math.exp(-0.125);
		expect(got[0]).toBeCloseTo(w / (1 + w), 12);
	});

	it('crosses the seam of a ring as if there were none', () => {
		const random = seeded(8);
		let at = 280;
		const run = Float64Array.from({ length: 40 }, () => (at += 3 * random.next()));
		const onRing = run.map((s) => s % 300);
		const got = onUnwrapped(onRing, 300, (s) => smoothInTime(clock(40, 0.03), s, one(40)));
		const plain = smoothInTime(clock(40, 0.03), run, one(40)).map((s) => s % 300);
		expect(worstDifference(got, [...plain])).toBeLessThan(1e-9);
	});

	it('does nothing for a width of 0 and refuses a negative one', () => {
		const x = Object.freeze([1, 5, NaN]);
		expect([...smoothInTime(clock(3), Float64Array.from(x), one(3), 0)]).toEqual([...x]);
		expect(() => smoothInTime(clock(3), Float64Array.from(x), one(3), -1)).toThrow(RangeError);
		expect(() => smoothInTime(clock(3), Float64Array.from(x), one(3), NaN)).toThrow(RangeError);
	});
});

describe('cleanPath', () => {
	const settings = { fastestCmS: 150, smoothS: 0 };
	const { jump, filled, missing } = SAMPLE_FLAGS;

	it('says of every sample what was done to it', () => {
		const x = Float64Array.of(NaN, 0, 1, 95, 3, NaN, 5, NaN, NaN, NaN, NaN, NaN, 11);
		const y = zeros(13);
		const got = cleanPath(clock(13), x, y, one(13), settings);
		const open = missing;
		expect([...got.flags]).toEqual([
			...[open, 0, 0, jump + filled, 0, filled, 0],
			...[open, open, open, open, open, 0]
		]);
		expect(got.xCm[3]).toBeCloseTo(2, 12);
		expect(got.xCm[5]).toBeCloseTo(4, 12);
		expect(got.yCm?.[5]).toBe(0);
		expect(got.yCm?.[8]).toBeNaN();
		expect(x[3]).toBe(95);
	});

	it('takes a sample with one of two coordinates for unknown', () => {
		const got = cleanPath(
			clock(3),
			Float64Array.of(0, 1, 2),
			Float64Array.of(0, NaN, 0),
			one(3),
			settings
		);
		expect([...got.flags]).toEqual([0, filled, 0]);
		expect(got.xCm[1]).toBeCloseTo(1, 12);
		expect(got.yCm?.[1]).toBe(0);
	});

	it('cleans along a ring over its seam', () => {
		const ring = parseArena('ring:300');
		if (ring.kind !== 'ring') throw new Error('expected a ring');
		const x = Float64Array.of(290, 295, 120, 5, NaN, 15);
		const got = cleanPath(clock(6), x, null, one(6), settings, ring);
		expect([...got.flags]).toEqual([0, 0, jump + filled, 0, filled, 0]);
		expect(worstDifference(got.xCm, [290, 295, 0, 5, 10, 15])).toBeLessThan(1e-9);
		expect(got.yCm).toBeNull();
		expect(() => cleanPath(clock(6), x, x, one(6), settings, ring)).toThrow(RangeError);
	});

	it('leaves what lies outside every stretch alone, and stands an empty path', () => {
		const x = Float64Array.of(1, 2, NaN);
		const got = cleanPath(clock(3), x, null, Int32Array.of(0, -1, -1), settings);
		expect([...got.xCm]).toEqual([1, 2, NaN]);
		expect([...got.flags]).toEqual([0, 0, 0]);
		expect(cleanPath(zeros(0), zeros(0), null, one(0), settings).flags).toHaveLength(0);
	});
});
