import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { binsOf } from '../arena/bins';
import { parseArena } from '../arena/parse-arena';
import { seeded } from '../random/seeded';
import { samplesOfSpikes } from '../spikes/samples-of-spikes';
import { information } from './information';
import { keptTime, spikeCells } from './kept-time';
import { occupancyInto } from './occupancy';
import { rateMapper } from './rate-map';
import { rawRates } from './raw-rates';
import { drawShifts, shiftTest } from './shift-test';
import { shiftedFigures } from './shifted-figures';
import { shiftedRawInformation } from './shifted-raw-information';
import { shiftedSmoothedInformation } from './shifted-smoothed-information';
import { smoothedInformation } from './smoothed-information';
import { smootherOf } from './smoother';

function evenTime(bin: readonly number[], dt: number, cellS: number) {
	const standS = new Float64Array(bin.length).fill(dt);
	return keptTime(Int32Array.from(bin), standS, new Uint8Array(bin.length).fill(1), cellS);
}

describe('shiftTest', () => {
	it('equals numpy for every listed shift, and counts p as (b + 1)/(m + 1)', () => {
		const { input, expected } = referenceCase<
			{
				dt: number;
				x: number[];
				spikeTimes: number[];
				T: number;
				binCm: number;
				length: number;
				shiftsS: number[];
			},
			{ observedBitsPerSpike: number; nullBitsPerSpike: number[]; p: number; nullMean: number }
		>('05_shuffle.json', 'circular_shift_information');
		const bins = binsOf(parseArena(`straight:${input.length}`), input.binCm);
		const bin = input.x.map((x) => bins.of(x, NaN));
		const n = bin.length;
		const all = new Uint8Array(n).fill(1);
		const tS = Float64Array.from({ length: n }, (_, i) => i * input.dt);
		const standS = new Float64Array(n).fill(input.dt);
		const occupancyS = new Float64Array(bins.count);
		occupancyInto(occupancyS, Int32Array.from(bin), standS, all);
		const bits = (counts: Float64Array) =>
			information(rawRates(counts, occupancyS, 1e-9), occupancyS).bitsPerSpike;
		// Shifts of the fixture end in half a millisecond: cells of that length make them whole.
		const cellS = 0.0005;
		const kept = evenTime(bin, input.dt, cellS);
		const spikes = Float64Array.from(input.spikeTimes, (t) => t + 1e-7);
		const samples = samplesOfSpikes(
			spikes,
			tS,
			standS.map((s) => s * 1.001)
		);
		const cells = spikeCells(kept, spikes, samples, tS, all);
		const shifts = Int32Array.from(input.shiftsS, (shift) => Math.round(shift / cellS));
		const either = [
			shiftedFigures(kept, shifts, bins.count, bits)(cells),
			shiftedRawInformation(kept, shifts, occupancyS, cells.length)(cells)
		];
		for (const values of either) {
			expect(worstDifference(values, expected.nullBitsPerSpike)).toBeLessThan(1e-9);
			const test = shiftTest(expected.observedBitsPerSpike, values);
			expect(test.p).toBe(expected.p);
			expect(test.nullMean).toBeCloseTo(expected.nullMean, 9);
		}
		const unshifted = shiftedFigures(kept, Int32Array.of(0), bins.count, bits)(cells);
		expect(unshifted[0]).toBeCloseTo(expected.observedBitsPerSpike, 9);
	});

	it('never reports p = 0 (Phipson and Smyth 2010)', () => {
		const values = Float64Array.from({ length: 1000 }, (_, m) => (m < 12 ? 1 : 0));
		expect(shiftTest(1, values).p).toBeCloseTo(0.012987013, 9);
		const few = shiftTest(5, new Float64Array(99));
		expect(few.p).toBe(0.01);
	});

	it('draws shifts at least 20 s from none, and none in under a minute', () => {
		const kept = evenTime(Array<number>(1000).fill(0), 0.125, 0.125);
		const shifts = drawShifts(kept, 8000, seeded(1));
		expect(Math.min(...shifts)).toBe(160);
		expect(Math.max(...shifts)).toBe(840);
		const short = evenTime(Array<number>(479).fill(0), 0.125, 0.125);
		expect(drawShifts(short, 50, seeded(1))).toHaveLength(0);
	});
});

describe('shifted information, compiled', () => {
	const grounds = ['rectangle:40x30', 'rectangle:51x7', 'straight:180', 'ring:90', 'disc:60'];
	it.each(grounds.flatMap((arena) => [0, 3, 5].map((sigma) => [arena, sigma] as const)))(
		'equals the plain way on %s, smoothed by %s cm',
		(text, sigmaCm) => {
			const arena = parseArena(text);
			const bins = binsOf(arena, 2);
			const smooth = smootherOf(arena, bins, sigmaCm, 'zero');
			const random = seeded(5);
			const bin = Array.from({ length: 3000 }, () => random.below(Math.ceil(0.8 * bins.count)));
			const kept = evenTime(bin, 0.1, 0.1);
			const occupancyS = new Float64Array(bins.count);
			for (const k of bin) occupancyS[k] += 0.1;
			const shifts = drawShifts(kept, 7, random);
			const compiled = shiftedSmoothedInformation(kept, shifts, occupancyS, smooth, 0.15, 900);
			const figure = smoothedInformation(occupancyS, smooth, 0.15);
			const plain = shiftedFigures(kept, shifts, bins.count, figure);
			for (const spikes of [900, 31, 1, 0]) {
				const cells = Int32Array.from({ length: spikes }, () => random.below(3000)).sort();
				const known = plain(cells);
				expect(Array.from(compiled(cells), isNaN)).toEqual(Array.from(known, isNaN));
				const defined = (values: Float64Array) => values.filter((value) => !Number.isNaN(value));
				expect(worstDifference(defined(compiled(cells)), defined(known))).toBeLessThan(1e-12);
			}
		}
	);
});

describe('keptTime', () => {
	it('closes up what does not count', () => {
		const bin = Int32Array.of(1, 2, 3, 4);
		const kept = keptTime(bin, new Float64Array(4).fill(0.5), Uint8Array.of(1, 0, 1, 1), 0.25);
		expect(kept.lengthS).toBe(1.5);
		expect([...kept.binTwice]).toEqual([1, 1, 3, 3, 4, 4, 1, 1, 3, 3, 4, 4]);
	});
});

describe('smoothedInformation', () => {
	it('equals the information of the map it never keeps', () => {
		const arena = parseArena('rectangle:40x30');
		const bins = binsOf(arena, 5);
		const smooth = smootherOf(arena, bins, 5, 'zero');
		const random = seeded(11);
		const occupancyS = Float64Array.from(
			{ length: bins.count },
			() => random.below(3) * random.next()
		);
		const counts = Float64Array.from({ length: bins.count }, (_, k) =>
			occupancyS[k] > 0 ? random.below(6) : 0
		);
		const rates = new Float64Array(bins.count);
		rateMapper(occupancyS, smooth, 0.1)(counts, rates);
		const quick = smoothedInformation(occupancyS, smooth, 0.1);
		expect(quick(counts.slice())).toBeCloseTo(information(rates, occupancyS).bitsPerSpike, 12);
		expect(quick(new Float64Array(bins.count))).toBeNaN();
	});
});
