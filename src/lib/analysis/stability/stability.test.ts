import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { binsOf } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { seeded } from '../random/seeded';
import { shuffled } from '../random/shuffled';
import { fisherZ } from '../statistics/fisher-z';
import { mean } from '../statistics/mean';
import { byLag } from './by-lag';
import { compareDays } from './compare-days';
import { meanOfTrueMatches, meanWithFalseMatches } from './false-matches';
import { mapCorrelation } from './map-correlation';
import { matchMaps, rowAt, type DayMaps } from './matched-maps';
import { drawPairings, pairingNull } from './pairing-null';
import { peakShiftCm } from './peak-shift';
import { populationVectors } from './population-vectors';
import { rateChange } from './rate-change';
import { remapping } from './remapping';

function dayOf(day: number, maps: readonly (readonly number[])[], lineage?: number[]): DayMaps {
	return {
		day,
		bins: maps[0].length,
		ratesHz: Float64Array.from(maps.flat()),
		meanHz: Float64Array.from(maps, (map) => mean(map.filter((rate) => !Number.isNaN(rate)))),
		lineage: Int32Array.from(lineage ?? maps.keys()),
		bundle: Int32Array.from(maps, (_, u) => Math.floor(u / 2))
	};
}
const sure = () => 1;
const randomMaps = (units: number, bins: number, seed: number, random = seeded(seed)) => {
	return Array.from({ length: units }, () => Array.from({ length: bins }, () => random.next()));
};
const ring = parseArena('ring:180');
const ringBins = binsOf(ring, 6);
const ringMetric = metricOf(ring);

const { input, expected } = referenceCase<
	{ maps: number[][][]; binCm: number; identityPermutations: number[][] },
	{
		mapCorrelationVsDay0: number[][];
		fisherZMean: number[];
		pvCorrelation: number[][];
		pvMean: number[];
		peakShiftCm: number[][];
		rateChangeIndex: number[][];
		rateOverlap: number[][];
		nullMeanZ: number[];
		observedMeanZ: number;
		exceedances: number;
		p: number;
	}
>('11_stability.json', 'across_days');

describe('compareDays', () => {
	it.each([1, 2, 3, 4])('equals scipy pearsonr and numpy on day %i against day 0', (day) => {
		const matched = matchMaps(dayOf(0, input.maps[0]), dayOf(day, input.maps[day]), sure);
		const got = compareDays(matched, ringBins, ringMetric);
		const d = day - 1;
		expect(worstDifference(got.mapR, expected.mapCorrelationVsDay0[d])).toBeLessThan(1e-9);
		expect(got.meanMapR).toBeCloseTo(expected.fisherZMean[d], 9);
		const vectors = got.populationVectors;
		expect(worstDifference(vectors.byBin, expected.pvCorrelation[d])).toBeLessThan(1e-9);
		expect(vectors.mean).toBeCloseTo(expected.pvMean[d], 9);
		expect(vectors).toMatchObject({ scale: 'raw', isTrusted: true });
		expect(worstDifference(got.peakShiftCm, expected.peakShiftCm[d])).toBeLessThan(1e-9);
		expect(worstDifference(got.rateChange, expected.rateChangeIndex[d])).toBeLessThan(1e-9);
		expect(worstDifference(got.rateOverlap, expected.rateOverlap[d])).toBeLessThan(1e-9);
	});

	it('does not depend on the order of units, and leaves its input alone', () => {
		const a = dayOf(0, input.maps[0]);
		const order = shuffled(10, seeded(2));
		const mixed = dayOf(
			1,
			[...order].map((u) => input.maps[1][u]),
			[...order]
		);
		const kept = mixed.ratesHz.slice();
		const plain = matchMaps(a, dayOf(1, input.maps[1]), sure);
		const again = matchMaps(a, mixed, sure);
		expect(again.laterHz).toEqual(plain.laterHz);
		expect([...again.laterRow].map((row) => order[row])).toEqual([...plain.laterRow]);
		expect(mixed.ratesHz).toEqual(kept);
	});

	it('gives the same whichever day comes first', () => {
		const one = compareDays(
			matchMaps(dayOf(0, input.maps[0]), dayOf(1, input.maps[3]), sure),
			ringBins,
			ringMetric
		);
		const other = compareDays(
			matchMaps(dayOf(0, input.maps[3]), dayOf(1, input.maps[0]), sure),
			ringBins,
			ringMetric
		);
		expect(worstDifference(one.mapR, [...other.mapR])).toBeLessThan(1e-12);
		expect(one.populationVectors.mean).toBeCloseTo(other.populationVectors.mean, 12);
		expect(one.medianPeakShiftCm).toBe(other.medianPeakShiftCm);
		expect(one.medianRateChange).toBeCloseTo(other.medianRateChange, 12);
	});

	it('weighs units by their bins when asked, and says how sure the pairs are', () => {
		const maps = input.maps[0].map((map, u) =>
			map.map((rate, k) => (u === 0 && k > 14 ? NaN : rate))
		);
		const matched = matchMaps(dayOf(0, maps), dayOf(1, input.maps[1]), (lineage) => lineage / 10);
		const got = compareDays(matched, ringBins, ringMetric);
		expect(got.sharedBins[0]).toBe(15);
		const z = [...got.mapR].map(fisherZ);
		const weights = [12, ...Array<number>(9).fill(27)];
		const sum = z.reduce((total, one, u) => total + weights[u] * one, 0);
		expect(got.weightedMapR).toBeCloseTo(Math.tanh(sum / (12 + 9 * 27)), 12);
		expect(got.meanProbability).toBeCloseTo(0.45, 12);
	});
});

describe('matchMaps', () => {
	it('never mixes matched and unmatched: one-day units and doubtful pairs stay out', () => {
		const maps = randomMaps(4, 12, 1);
		const matched = matchMaps(
			dayOf(0, maps, [7, 3, 5, 9]),
			dayOf(2, maps, [5, 8, 7, 9]),
			(lineage) => (lineage === 9 ? 0.6 : 0.95),
			0.9
		);
		expect(matched.units).toBe(2);
		expect([...matched.earlierRow]).toEqual([2, 0]);
		expect([...matched.laterRow]).toEqual([0, 2]);
		expect(matched.lagDays).toBe(2);
	});

	it('refuses other bins, days the wrong way round, and a lineage twice on a day', () => {
		const day = (n: number, bins: number) => dayOf(n, randomMaps(2, bins, 1));
		expect(() => matchMaps(day(0, 10), day(1, 11), sure)).toThrow(RangeError);
		expect(() => matchMaps(day(1, 10), day(1, 10), sure)).toThrow(RangeError);
		const twice = dayOf(0, randomMaps(2, 10, 1), [4, 4]);
		expect(() => matchMaps(twice, day(1, 10), sure)).toThrow(RangeError);
	});
});

describe('mapCorrelation', () => {
	it('needs ten bins that both maps define, and two maps that vary', () => {
		const a = Float64Array.from({ length: 12 }, (_, k) => k);
		const b = a.map((rate, k) => (k < 2 ? NaN : rate * rate));
		expect(mapCorrelation(a, b).bins).toBe(10);
		expect(mapCorrelation(a, b).r).toBeGreaterThan(0.9);
		expect(mapCorrelation(a, b.with(5, NaN))).toEqual({ r: NaN, bins: 9 });
		expect(mapCorrelation(a, new Float64Array(12).fill(3)).r).toBeNaN();
		expect(() => mapCorrelation(a, new Float64Array(11))).toThrow(RangeError);
	});
});

describe('populationVectors', () => {
	it('need five units in a bin, and are not trusted under ten', () => {
		const maps = randomMaps(5, 12, 3);
		const four = matchMaps(dayOf(0, maps.slice(1)), dayOf(1, maps.slice(1)), sure);
		expect(populationVectors(four).mean).toBeNaN();
		const five = populationVectors(matchMaps(dayOf(0, maps), dayOf(1, maps), sure));
		expect(five.mean).toBeCloseTo(1, 12);
		expect(five.isTrusted).toBe(false);
		const holed = maps.map((map, u) => (u === 0 ? map.with(4, NaN) : map));
		const got = populationVectors(matchMaps(dayOf(0, holed), dayOf(1, maps), sure));
		expect(got.byBin[4]).toBeNaN();
		expect(got.mean).toBeCloseTo(1, 12);
	});

	it('forget a change of gain of single units when peak-normalised, and leave silent units out', () => {
		const maps = [...randomMaps(6, 12, 4), Array<number>(12).fill(0)];
		const louder = maps.map((map, u) => map.map((rate) => rate * (u + 1)));
		const matched = matchMaps(dayOf(0, maps), dayOf(1, louder), sure);
		expect(populationVectors(matched, 'peak-normalised').mean).toBeCloseTo(1, 12);
		expect(populationVectors(matched, 'raw').mean).toBeLessThan(0.95);
	});
});

describe('peakShiftCm', () => {
	it('goes the short way on a ring: peaks at 290 and 15 of 300 cm are 25 cm apart', () => {
		const arena = parseArena('ring:300');
		const bins = binsOf(arena, 10);
		const a = new Float64Array(30);
		const b = new Float64Array(30);
		a[bins.of(290.5, NaN)] = 5;
		b[bins.of(15, NaN)] = 5;
		// Centres of the two bins: 295 and 15.
		expect(peakShiftCm(a, b, bins, metricOf(arena))).toBe(20);
		expect(metricOf(arena)(290, NaN, 15, NaN)).toBe(25);
		expect(peakShiftCm(a, new Float64Array(30), bins, metricOf(arena))).toBeNaN();
	});
});

describe('rateChange', () => {
	it('is 0.6 with overlap 0.25 for 4 and 1 Hz, undefined for two silent days', () => {
		expect(rateChange(4, 1)).toEqual({ change: 0.6, overlap: 0.25 });
		expect(rateChange(1, 4)).toEqual(rateChange(4, 1));
		expect(rateChange(0, 2)).toEqual({ change: 1, overlap: 0 });
		expect(rateChange(0, 0)).toEqual({ change: NaN, overlap: NaN });
		expect(() => rateChange(-1, 2)).toThrow(RangeError);
	});
});

describe('pairingNull', () => {
	const matched = matchMaps(dayOf(0, input.maps[0]), dayOf(4, input.maps[4]), sure);

	it('equals numpy for the listed permutations', () => {
		const pairings = input.identityPermutations.map((one) => Int32Array.from(one));
		const got = pairingNull(matched, pairings);
		expect(got.meanZ).toBeCloseTo(expected.observedMeanZ, 9);
		expect(worstDifference(got.nullMeanZ, expected.nullMeanZ)).toBeLessThan(1e-9);
		expect(got.p).toBe(expected.p);
		const atLeast = got.nullMeanZ.filter((z) => z >= got.meanZ).length;
		expect(atLeast).toBe(expected.exceedances);
	});

	it('keeps units in their bundle when asked, and moves them all over otherwise', () => {
		const bundle = Int32Array.of(0, 0, 1, 1, 1, 2);
		for (const pairing of drawPairings(bundle, 'within-bundle', 50, seeded(5))) {
			expect([...pairing].map((u) => bundle[u])).toEqual([...bundle]);
			expect([...pairing].sort()).toEqual([0, 1, 2, 3, 4, 5]);
		}
		const across = drawPairings(bundle, 'across-bundles', 50, seeded(5));
		expect(across.some((pairing) => bundle[pairing[0]] !== 0)).toBe(true);
	});

	it('says nothing when no unit can change its place, and nothing without pairings', () => {
		const alone = drawPairings(Int32Array.of(0, 1, 2), 'within-bundle', 20, seeded(6));
		const three = matchMaps(
			dayOf(0, input.maps[0].slice(7)),
			dayOf(1, input.maps[1].slice(7)),
			sure
		);
		expect(pairingNull(three, alone).p).toBeNaN();
		expect(pairingNull(matched, []).p).toBeNaN();
		const flat = Array.from({ length: 3 }, () => Array<number>(12).fill(1));
		const nothing = matchMaps(dayOf(0, flat), dayOf(1, flat), sure);
		expect(pairingNull(nothing, [Int32Array.of(1, 2, 0)])).toMatchObject({ meanZ: NaN, p: NaN });
	});

	it('finds a uniform p when the match means nothing (200 pairs of unrelated days)', () => {
		// One generator: those of neighbouring seeds begin alike.
		const random = seeded(11);
		let under = 0;
		for (let k = 0; k < 200; k++) {
			const unrelated = matchMaps(
				dayOf(0, randomMaps(6, 12, 0, random)),
				dayOf(1, randomMaps(6, 12, 0, random)),
				sure
			);
			const pairings = drawPairings(unrelated.bundle, 'across-bundles', 99, random);
			if (pairingNull(unrelated, pairings).p <= 0.2) under++;
		}
		// 40 expected, σ 5.7.
		expect(Math.abs(under - 40)).toBeLessThan(20);
	});
});

describe('remapping', () => {
	const evidence = {
		meanZ: 1.2,
		nullMeanZ: Float64Array.from({ length: 101 }, (_, k) => k / 200),
		withinSessionZ: 1.5,
		medianRateChange: 0.1,
		hoursSinceMove: Infinity
	};
	it.each([
		['stable', {}],
		['stable', { medianRateChange: 0.3 }],
		['rate-remapping', { medianRateChange: 0.301 }],
		['global-change', { meanZ: 0.475 }],
		['partial', { meanZ: 0.476 }],
		['stable', { meanZ: 0.75 }],
		['withheld', { hoursSinceMove: 23.9 }],
		['stable', { hoursSinceMove: 24 }],
		['withheld', { hoursSinceMove: NaN }],
		['not-known', { meanZ: NaN }],
		['not-known', { nullMeanZ: new Float64Array(0) }],
		['not-known', { withinSessionZ: NaN }],
		['not-known', { medianRateChange: NaN }]
	] as const)('is %s with %o', (label, change) => {
		expect(remapping({ ...evidence, ...change })).toBe(label);
	});
});

describe('false matches', () => {
	it('pull the mean towards the null in proportion, and back (by hand)', () => {
		expect(meanWithFalseMatches(0.9, 0.8, 0.1)).toBeCloseTo(0.73, 12);
		expect(meanOfTrueMatches(0.9, 0.73, 0.1)).toBeCloseTo(0.8, 12);
		expect(meanOfTrueMatches(0, 0.1, 0.1)).toBeNaN();
		expect(() => meanWithFalseMatches(1.1, 0.8, 0.1)).toThrow(RangeError);
	});

	it('do to simulated maps what the formula says', () => {
		const a = randomMaps(40, 30, 8);
		const b = a.map((map, u) =>
			map.map((rate, k) => rate + 0.5 * randomMaps(1, 30, 100 + u)[0][k])
		);
		const r = (i: number, j: number) =>
			mapCorrelation(Float64Array.from(a[i]), Float64Array.from(b[j])).r;
		// Ten of forty pairs are two cells: units 0 to 9 each take the next one's partner.
		const partner = (u: number) => (u < 10 ? (u + 1) % 10 : u);
		const all = a.map((_, u) => r(u, partner(u)));
		const right = mean(all.slice(10));
		const wrong = mean(all.slice(0, 10));
		expect(mean(all)).toBeCloseTo(meanWithFalseMatches(0.75, right, wrong), 12);
	});
});

describe('byLag', () => {
	it('joins pairs of days with the same lag, shortest first, without those that share no unit', () => {
		const days = input.maps.map((maps, day) => dayOf(day, maps));
		const strangers = dayOf(
			9,
			input.maps[0],
			Array.from({ length: 10 }, (_, u) => u + 50)
		);
		const pairs = [...days, strangers].flatMap((later, k, all) =>
			all
				.slice(0, k)
				.map((earlier) => compareDays(matchMaps(earlier, later, sure), ringBins, ringMetric))
		);
		const lags = byLag(pairs);
		expect(lags.map(({ lagDays, dayPairs, units }) => [lagDays, dayPairs, units])).toEqual([
			[1, 4, 40],
			[2, 3, 30],
			[3, 2, 20],
			[4, 1, 10]
		]);
		expect(lags[3].meanMapR).toBeCloseTo(expected.fisherZMean[3], 9);
		expect(lags[3].meanPopulationR).toBeCloseTo(expected.pvMean[3], 9);
		expect(byLag([])).toEqual([]);
	});
});

describe('rowAt', () => {
	it('is a view of one unit', () => {
		expect([...rowAt(Float64Array.of(1, 2, 3, 4, 5, 6), 3, 1)]).toEqual([4, 5, 6]);
	});
});
