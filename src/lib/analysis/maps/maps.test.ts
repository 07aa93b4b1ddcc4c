import { describe, expect, it } from 'vitest';
import { numbers, referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { binsOf, type Bins } from '../arena/bins';
import { parseArena } from '../arena/parse-arena';
import { coherence } from './coherence';
import { placeFields, type Field } from './fields';
import { information } from './information';
import { neighboursOf } from './neighbours';
import { occupancyInto } from './occupancy';
import { rateMapper } from './rate-map';
import { rawRates } from './raw-rates';
import type { EdgeRule } from './smooth-line';
import { smootherOf } from './smoother';
import { spikeCountsInto } from './spike-counts';
import { samplesOfSpikes } from '../spikes/samples-of-spikes';

type Numbers = (number | null)[];
interface Told {
	meanRate: number;
	bitsPerSpike: number | null;
	bitsPerSecond: number | null;
	sparsity: number | null;
	selectivity: number | null;
}

function expectInformation(got: ReturnType<typeof information>, told: Told): void {
	const flat = [got.meanRateHz, got.bitsPerSpike, got.bitsPerS, got.sparsity, got.selectivity];
	const { meanRate, bitsPerSpike, bitsPerSecond, sparsity, selectivity } = told;
	expect(
		worstDifference(flat, [meanRate, bitsPerSpike, bitsPerSecond, sparsity, selectivity])
	).toBeLessThan(1e-9);
}

function smoothed(arenaText: string, binCm: number, sigmaCm: number, edge: EdgeRule) {
	const arena = parseArena(arenaText);
	const bins = binsOf(arena, binCm);
	return { arena, bins, smooth: smootherOf(arena, bins, sigmaCm, edge) };
}

describe('smoothing', () => {
	it.each(['straight:5', 'ring:5'])('spreads one count over %s (scipy.ndimage)', (arena) => {
		const { smooth } = smoothed(arena, 1, 1, 'reflect');
		const counts = Float64Array.of(0, 0, 4, 0, 0);
		const out = new Float64Array(5);
		smooth(counts, out);
		expect(
			worstDifference(out, [0.233691956, 0.968421105, 1.595773877, 0.968421105, 0.233691956])
		).toBeLessThan(1e-9);
	});

	it('divides smoothed counts by smoothed dwell and leaves short stays undefined', () => {
		const { smooth } = smoothed('straight:5', 1, 1, 'reflect');
		const toRates = rateMapper(Float64Array.of(1, 2, 0, 1, 0.5), smooth, 0.1);
		const out = new Float64Array(5);
		toRates(Float64Array.of(2, 4, 0, 6, 1), out);
		expect(
			worstDifference(out, [2.014758119, 2.186338993, null, 4.430321179, 3.892085998])
		).toBeLessThan(1e-9);
	});

	it('keeps the sum on a ring and in any number of rows, and loses it over open edges', () => {
		const ring = smoothed('ring:60', 5, 5, 'zero').smooth;
		const grid = smoothed('rectangle:35x30', 5, 5, 'reflect').smooth;
		const open = smoothed('rectangle:35x30', 5, 5, 'zero').smooth;
		const sum = (smooth: typeof ring, length: number) => {
			const out = new Float64Array(length);
			smooth(
				Float64Array.from({ length }, (_, k) => k),
				out
			);
			return out.reduce((a, b) => a + b, 0);
		};
		expect(sum(ring, 12)).toBeCloseTo(66, 9);
		expect(sum(grid, 42)).toBeCloseTo(861, 9);
		expect(sum(open, 42)).toBeLessThan(861);
	});

	it('spreads over a tree by the way along it: the two arms beyond a junction alike', () => {
		const { bins, smooth } = smoothed('tree:0,0>40,0;40,0>40,40;40,0>80,0', 10, 10, 'zero');
		const counts = new Float64Array(bins.count);
		counts[3] = 1;
		const out = new Float64Array(bins.count);
		smooth(counts, out);
		expect(out[4]).toBeCloseTo(out[8], 12);
		expect(out[4]).toBeCloseTo(Math.exp(-0.5), 12);
	});
});

describe('information', () => {
	it('is two bits for one of four places (hand-worked)', () => {
		const told = information(Float64Array.of(8, 0, 0, 0), new Float64Array(4).fill(0.25));
		expect(told).toMatchObject({ bitsPerSpike: 2, bitsPerS: 4, sparsity: 0.25, selectivity: 4 });
	});

	it('equals a Kullback–Leibler divergence (scipy.stats.entropy)', () => {
		expectInformation(information(Float64Array.of(1, 2, 4, 8), Float64Array.of(1, 2, 3, 4)), {
			meanRate: 4.9,
			bitsPerSpike: 0.23783049567,
			bitsPerSecond: 1.1653694287835554,
			sparsity: 0.767092651757,
			selectivity: 1.632653061224
		});
	});

	it('is log₂(1/f) for firing in a share f of the time, and zero for a flat map', () => {
		const tenth = information(Float64Array.of(5, 0), Float64Array.of(0.1, 0.9));
		expect(tenth.bitsPerSpike).toBeCloseTo(Math.log2(10), 12);
		const flat = information(
			new Float64Array(9).fill(3.7),
			Float64Array.from({ length: 9 }, (_, k) => k + 1)
		);
		expect(Math.abs(flat.bitsPerSpike)).toBeLessThan(1e-12);
	});

	it('is undefined without a spike, never zero', () => {
		expect(information(new Float64Array(4), new Float64Array(4).fill(1)).bitsPerSpike).toBeNaN();
	});
});

describe('fields', () => {
	function fieldsOf(arenaText: string, rates: number[]): { bins: Bins; fields: Field[] } {
		const arena = parseArena(arenaText);
		const bins = binsOf(arena, 2);
		const touching = neighboursOf(arena, bins, false);
		const rule = { threshold: 0.2, minBins: 4, minPeakHz: 1 };
		return { bins, fields: placeFields(Float64Array.from(rates), bins, touching, rule) };
	}

	it('takes touching bins above a fifth of the peak (hand-worked)', () => {
		const { bins, fields } = fieldsOf('straight:20', [0, 0, 1, 4, 10, 6, 2, 0, 0, 0]);
		expect(fields).toHaveLength(1);
		expect(fields[0]).toMatchObject({ bins: [3, 4, 5, 6], peakRateHz: 10, meanRateHz: 5.5 });
		expect(bins.centreXCm[fields[0].peakBin]).toBe(9);
		expect(fields[0].centreXCm).toBeCloseTo(210 / 22, 12);
	});

	it('joins a field across the seam of a ring', () => {
		const { fields } = fieldsOf('ring:20', [10, 6, 2, 0, 0, 0, 0, 0, 1, 4]);
		expect(fields[0].bins).toEqual([0, 1, 2, 9]);
		expect(fields[0].centreXCm).toBeCloseTo(1.545454545454545, 12);
	});

	it('is broken by an undefined bin and flags a field that fills a ring', () => {
		expect(fieldsOf('straight:20', [0, 5, 5, 5, NaN, 5, 5, 5, 0, 0]).fields).toEqual([]);
		expect(fieldsOf('ring:20', [5, 5, 6, 7, 8, 7, 6, 5, 5, 5]).fields[0].isWholeRing).toBe(true);
	});
});

describe('coherence', () => {
	it('correlates each bin with the mean of its eight neighbours', () => {
		const arena = parseArena('rectangle:3x3');
		const around = neighboursOf(arena, binsOf(arena, 1), true);
		const r = coherence(Float64Array.of(1, 2, 1, 2, 8, 4, 1, 3, 2), around);
		expect(r).toBeCloseTo(-0.777679814709466, 9);
	});
});

interface TrackInput {
	length: number;
	dt: number;
	x: number[];
	speed: number[];
	minSpeed: number;
	binCm: number;
	sigmaCm: number;
	minOccupancyS: number;
	fieldMinBins: number;
}
interface TrackUnit {
	spikeTimes: number[];
	expected: {
		counts: number[];
		rateRaw: Numbers;
		rateRatioSmoothed: Numbers;
		infoRaw: Told;
		infoSmoothed: Told;
		coherenceRaw: { r: number };
		fields: {
			nBins: number;
			peakHz: number;
			peakCm: number;
			comCm: number;
			meanInFieldHz: number;
		}[];
	};
}

describe.each([
	['02_maps_1d.json', 'linear_track', 'straight'],
	['03_maps_circular.json', 'circular_track', 'ring']
])('maps of %s (numpy, scipy)', (file, id, kind) => {
	const { input, expected, units } = referenceCase<TrackInput, { occupancyS: number[] }>(file, id);
	const { arena, bins, smooth } = smoothed(
		`${kind}:${input.length}`,
		input.binCm,
		input.sigmaCm,
		'reflect'
	);
	const tS = Float64Array.from(input.x, (_, i) => i * input.dt);
	const standS = new Float64Array(tS.length).fill(input.dt);
	const bin = Int32Array.from(input.x, (x) => bins.of(x, NaN));
	const isUsed = Uint8Array.from(input.speed, (speed) => (speed >= input.minSpeed ? 1 : 0));
	const occupancyS = new Float64Array(bins.count);
	occupancyInto(occupancyS, bin, standS, isUsed);
	const touching = neighboursOf(arena, bins, false);

	it('agree in dwell', () => {
		expect(worstDifference(occupancyS, expected.occupancyS)).toBeLessThan(1e-9);
	});

	it.each((units as TrackUnit[]).map((unit, i) => [i, unit] as const))(
		'agree in counts, rates, information, coherence and fields of unit %d',
		(_, { spikeTimes, expected: want }) => {
			const counts = new Float64Array(bins.count);
			// The fixture gives a spike to sample floor(t / dt) with a slack of 1e-9 s.
			const late = Float64Array.from(spikeTimes, (t) => t + 1e-9);
			spikeCountsInto(
				counts,
				samplesOfSpikes(
					late,
					tS,
					standS.map((s) => s * 1.0001)
				),
				bin,
				isUsed
			);
			expect([...counts]).toEqual(want.counts);
			const raw = rawRates(counts, occupancyS, input.minOccupancyS);
			const rates = new Float64Array(bins.count);
			rateMapper(occupancyS, smooth, input.minOccupancyS)(counts, rates);
			expect(worstDifference(raw, want.rateRaw)).toBeLessThan(1e-9);
			expect(worstDifference(rates, want.rateRatioSmoothed)).toBeLessThan(1e-9);
			expectInformation(information(raw, occupancyS), want.infoRaw);
			expectInformation(information(rates, occupancyS), want.infoSmoothed);
			expect(coherence(raw, touching)).toBeCloseTo(want.coherenceRaw.r, 9);
			const rule = { threshold: 0.2, minBins: input.fieldMinBins, minPeakHz: 1 };
			const fields = placeFields(rates, bins, touching, rule);
			const flat = (list: readonly number[][]) => list.flat();
			const got = fields.map((f) => [
				f.bins.length,
				f.peakRateHz,
				bins.centreXCm[f.peakBin],
				f.centreXCm,
				f.meanRateHz
			]);
			const wanted = want.fields.map((f) => [
				f.nBins,
				f.peakHz,
				f.peakCm,
				f.comCm,
				f.meanInFieldHz
			]);
			expect(worstDifference(flat(got), flat(wanted))).toBeLessThan(1e-9);
		}
	);
});

describe('maps of 04_maps_2d.json (numpy, scipy), a square with one quadrant missing', () => {
	interface PlaneUnit {
		spikeSampleIndex: number[];
		expected: {
			rateRatioSmoothed: Numbers[];
			infoRaw: Told;
			infoSmoothed: Told;
			coherenceRaw: { r: number };
			fields: { nBins: number; peakBin: number[]; comCm: number[]; meanInFieldHz: number }[];
		};
	}
	const { input, expected, units } = referenceCase<
		{
			side: number;
			dt: number;
			xy10: [number, number][];
			binCm: number;
			sigmaCm: number;
			minOccupancyS: number;
		},
		{ occupancyS: number[][] }
	>('04_maps_2d.json', 'open_field_with_missing_quadrant');
	const side = input.side;
	const { arena, bins, smooth } = smoothed(
		`rectangle:${side}x${side}`,
		input.binCm,
		input.sigmaCm,
		'reflect'
	);
	const bin = Int32Array.from(input.xy10, ([x, y]) => bins.of(x / 10, y / 10));
	const all = new Uint8Array(bin.length).fill(1);
	const occupancyS = new Float64Array(bins.count);
	occupancyInto(occupancyS, bin, new Float64Array(bin.length).fill(input.dt), all);
	/** The fixture is [xBin][yBin]. */
	const rowMajor = (columns: readonly Numbers[]) =>
		numbers(
			Array.from(
				{ length: bins.count },
				(_, k) => columns[k % bins.binsX][Math.floor(k / bins.binsX)]
			)
		);

	it('agree in dwell', () => {
		expect(worstDifference(occupancyS, rowMajor(expected.occupancyS))).toBeLessThan(1e-9);
	});

	it.each((units as PlaneUnit[]).map((unit, i) => [i, unit] as const))(
		'agree in rates, information, coherence and fields of unit %d',
		(_, { spikeSampleIndex, expected: want }) => {
			const counts = new Float64Array(bins.count);
			spikeCountsInto(counts, Int32Array.from(spikeSampleIndex), bin, all);
			const raw = rawRates(counts, occupancyS, input.minOccupancyS);
			const rates = new Float64Array(bins.count);
			rateMapper(occupancyS, smooth, input.minOccupancyS)(counts, rates);
			expect(worstDifference(rates, rowMajor(want.rateRatioSmoothed))).toBeLessThan(1e-9);
			expectInformation(information(raw, occupancyS), want.infoRaw);
			expectInformation(information(rates, occupancyS), want.infoSmoothed);
			expect(coherence(raw, neighboursOf(arena, bins, true))).toBeCloseTo(want.coherenceRaw.r, 9);
			const rule = { threshold: 0.2, minBins: 9, minPeakHz: 1 };
			const fields = placeFields(rates, bins, neighboursOf(arena, bins, false), rule);
			const found = fields.map((f) => ({
				nBins: f.bins.length,
				peakBin: [f.peakBin % bins.binsX, Math.floor(f.peakBin / bins.binsX)]
			}));
			expect(found).toEqual(want.fields.map(({ nBins, peakBin }) => ({ nBins, peakBin })));
			const got = fields.flatMap((f) => [f.centreXCm, f.centreYCm, f.meanRateHz]);
			const wanted = want.fields.flatMap((f) => [...f.comCm, f.meanInFieldHz]);
			expect(worstDifference(got, wanted)).toBeLessThan(1e-9);
		}
	);
});
