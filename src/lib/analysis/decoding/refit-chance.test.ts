import { describe, expect, it } from 'vitest';
import { sparse } from '../../../../tests/factories/decoding';
import { binsOf } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { drawShifts } from '../maps/shift-test';
import { smootherOf } from '../maps/smoother';
import { drawPoisson } from '../random/poisson-draw';
import { seeded } from '../random/seeded';
import { foldsOf } from './folds';
import { refitChance, type RefitInput } from './refit-chance';

const WINDOWS = 600;
const TAU_S = 0.25;
const arena = parseArena('straight:180');
const bins = binsOf(arena, 5);
const metric = metricOf(arena);

/** An animal to and fro, and units that fire at its place, or anywhere. */
function session(isLinked: boolean, seed: number): RefitInput {
	const random = seeded(seed);
	const xCm = Array.from(
		{ length: WINDOWS },
		(_, w) => 90 - 89 * Math.cos(w / 9 + Math.sin(w / 70))
	);
	const units = 16;
	const counts = xCm.map((x) =>
		Array.from({ length: units }, (_, u) => {
			const from = isLinked ? x : 180 * random.next();
			const rate = 0.3 + 14 * Math.exp(-(((from - ((u + 0.5) * 180) / units) / 12) ** 2) / 2);
			return drawPoisson(rate * TAU_S, random);
		})
	);
	const windows = {
		lengthS: TAU_S,
		startS: Float64Array.from(xCm, (_, w) => w * TAU_S),
		sample: Int32Array.from(xCm.keys())
	};
	return {
		counts: sparse(counts),
		units,
		windowS: TAU_S,
		trueBin: Int32Array.from(xCm, (x) => bins.of(x, NaN)),
		folds: foldsOf(windows, 5),
		bins: bins.count,
		smooth: smootherOf(arena, bins, 5, 'zero'),
		minOccupancyS: 0.1,
		prior: 'even',
		errorCm: (bin, w) => metric(bins.centreXCm[bin], NaN, xCm[w], NaN)
	};
}
const shifts = drawShifts(
	{ lengthS: WINDOWS * TAU_S, cellS: TAU_S, cells: WINDOWS },
	60,
	seeded(1)
);

describe('refitChance', () => {
	it('is far worse than decoding when spikes follow place', () => {
		const input = session(true, 3);
		const [observed] = refitChance(input, NaN, [0]).mediansCm;
		const told = refitChance(input, observed, shifts);
		expect(observed).toBeLessThan(8);
		expect(told.medianCm).toBeGreaterThan(25);
		expect(told.p).toBeCloseTo(1 / 61, 15);
	});

	it('is what decoding gives when spikes know nothing of place', () => {
		const ps = [4, 5, 6, 7].map((seed) => {
			const input = session(false, seed);
			const [observed] = refitChance(input, NaN, [0]).mediansCm;
			return refitChance(input, observed, shifts).p;
		});
		expect(Math.max(...ps)).toBeGreaterThan(0.2);
		expect(ps.every((p) => p > 0.005)).toBe(true);
	});

	it('wraps at the end: a shift by all windows is none', () => {
		const { mediansCm } = refitChance(session(true, 3), NaN, [0, WINDOWS]);
		expect(mediansCm[1]).toBe(mediansCm[0]);
	});

	it('is undefined without shifts, without an observed error, and where nothing can be answered', () => {
		const input = session(true, 3);
		expect(refitChance(input, 5, []).p).toBeNaN();
		expect(refitChance(input, NaN, [100]).p).toBeNaN();
		expect(refitChance({ ...input, minOccupancyS: 1e6 }, 5, [100]).medianCm).toBeNaN();
	});
});
