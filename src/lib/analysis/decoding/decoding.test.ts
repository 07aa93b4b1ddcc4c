import { describe, expect, it } from 'vitest';
import { decodeAll, modelOf, posteriorsOf } from '../../../../tests/factories/decoding';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { binsOf } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { seeded } from '../random/seeded';
import { logSumExp } from '../statistics/log-sum-exp';
import { calibration } from './calibration';
import { decodedAgainstTrue } from './decoded-against-true';
import { entropyBits } from './entropy-bits';
import { errorSummary } from './error-summary';
import { logScore } from './log-score';
import { normalise } from './normalise';
import { posteriorMean } from './posterior-mean';

describe('memoryless Poisson decoder', () => {
	const rates = [
		[10, 2],
		[1, 5]
	];

	it('weighs spikes and silence (hand-worked)', () => {
		const { store } = decodeAll(
			modelOf(rates, [1, 1], 'even'),
			[
				[2, 1],
				[0, 0]
			],
			0.25,
			2
		);
		expect(store.probabilities[0]).toBeCloseTo(0.647812571648, 7);
		expect(store.probabilities[2]).toBeCloseTo(0.26894142137, 7);
	});

	it('gives both places their share to nine digits (hand-worked)', () => {
		const [spikes, silence] = posteriorsOf(
			modelOf(rates, [1, 1]),
			[
				[2, 1],
				[0, 0]
			],
			0.25
		);
		expect(worstDifference(spikes, [0.6478125716482483, 0.3521874283517516])).toBeLessThan(1e-9);
		expect(worstDifference(silence, [0.26894142136999516, 0.7310585786300051])).toBeLessThan(1e-9);
	});

	it('takes the time spent as prior when asked', () => {
		const { store } = decodeAll(modelOf(rates, [8, 2], 'time-spent'), [[0, 0]], 0.25, 2);
		expect(store.probabilities[0]).toBeCloseTo(0.595390324808, 7);
	});

	it('survives 400 units in 2 s, where every product of probabilities underflows (scipy)', () => {
		const { input, expected } = referenceCase<
			{ counts: number[]; tauS: number },
			{ logPosterior: number[]; mapBin: number; linearProductsAllZero: boolean }
		>('06_decoder.json', 'underflow_needs_log_domain');
		const places = Array.from({ length: 20 }, (_, i) => (i + 0.5) * 10);
		const rate = (unit: number, x: number) => {
			const centre = (unit * 200) / 399;
			return Math.round((1 + 14 * Math.exp(-((centre - x) ** 2) / (2 * 144))) * 1000) / 1000;
		};
		const fields = input.counts.map((_, u) => places.map((x) => rate(u, x)));
		const model = modelOf(
			fields,
			places.map(() => 1),
			'even'
		);
		const { bin, evidence } = decodeAll(model, [input.counts], input.tauS, 20);
		const total = logSumExp(evidence[0]);
		expect(
			worstDifference(
				evidence[0].map((e) => e - total),
				expected.logPosterior
			)
		).toBeLessThan(1e-7);
		expect(bin[0]).toBe(expected.mapBin);
		const isLost = places.every(
			(_, p) =>
				fields.reduce((product, row, u) => {
					const mean = row[p] * input.tauS;
					let probability = Math.exp(-mean);
					for (let n = 1; n <= input.counts[u]; n++) probability *= mean / n;
					return product * probability;
				}, 1) === 0
		);
		expect(isLost).toBe(expected.linearProductsAllZero);
	});

	it('gives a posterior that sums to one', () => {
		const random = seeded(2);
		const many = Array.from({ length: 9 }, () =>
			Array.from({ length: 30 }, () => 20 * random.next())
		);
		const counts = Array.from({ length: 25 }, () => many.map(() => random.below(3)));
		const { store } = decodeAll(modelOf(many, Array<number>(30).fill(1), 'even'), counts, 0.25, 30);
		for (let w = 0; w < 25; w++) {
			const sum = store.probabilities.subarray(w * 30, w * 30 + 30).reduce((a, b) => a + b, 0);
			expect(sum).toBeCloseTo(1, 6);
		}
	});

	it('does not care about the order of the units', () => {
		const back = (list: readonly number[]) => [...list].reverse();
		const three = [...rates, [4, 4.5]];
		const forward = decodeAll(modelOf(three, [1, 1], 'even'), [[2, 1, 5]], 0.25, 2);
		const reversed = decodeAll(
			modelOf([...three].reverse(), [1, 1], 'even'),
			[back([2, 1, 5])],
			0.25,
			2
		);
		expect(worstDifference(reversed.log2AtTrue, forward.log2AtTrue)).toBeLessThan(1e-12);
	});
});

interface DecoderInput {
	binCentresCm: number[];
	length: number;
	ratesHz: number[][];
	tauS: number;
	counts: number[][];
	trueBin: number[];
	occupancyS: number[];
}
interface DecoderExpected {
	posteriorFirst5: number[][];
	mapBin: number[];
	posteriorMeanCm: number[];
	mapErrorCm: number[];
	metrics: { median: number; mean: number; p95: number; fracWithin10: number; n: number };
	hpdCoverage: Record<string, number>;
	entropyBits: number[];
	logPosteriorAtTrue: (number | null)[];
}

describe.each([
	['poisson_linear', 'straight'],
	['poisson_circular', 'ring']
])('decoder of %s (scipy.stats.poisson)', (id, kind) => {
	const { input, expected } = referenceCase<
		DecoderInput,
		{
			uniform: DecoderExpected;
			occupancy: DecoderExpected;
			singleUnitPosteriorFirst3: number[][];
			decodedVsTrueRowNormalised: (number | null)[][];
		}
	>('06_decoder.json', id);
	const count = input.occupancyS.length;
	const arena = parseArena(`${kind}:${input.length}`);
	const bins = binsOf(arena, input.length / count);
	const metric = metricOf(arena);
	const trueBin = Int32Array.from(input.trueBin);

	it.each([
		['even', expected.uniform],
		['time-spent', expected.occupancy]
	] as const)('agrees in every figure with the %s prior', (prior, want) => {
		const model = modelOf(input.ratesHz, input.occupancyS, prior);
		const got = decodeAll(model, input.counts, input.tauS, count, input.trueBin);
		const posteriors = posteriorsOf(model, input.counts, input.tauS);
		want.posteriorFirst5.forEach((row, w) => {
			expect(worstDifference(posteriors[w], row)).toBeLessThan(1e-9);
			// What is kept for looking at is in single precision.
			const kept = got.store.probabilities.subarray(w * count, (w + 1) * count);
			expect(worstDifference(kept, row)).toBeLessThan(1e-7);
		});
		expect([...got.bin]).toEqual(want.mapBin);
		const means = posteriors.map((row) => posteriorMean(row, bins, arena).xCm);
		expect(worstDifference(means, want.posteriorMeanCm)).toBeLessThan(1e-9);
		expect(worstDifference(posteriors.map(entropyBits), want.entropyBits)).toBeLessThan(1e-9);
		const logAtTrue = got.log2AtTrue.map((bits) => bits * Math.LN2);
		expect(worstDifference(logAtTrue, want.logPosteriorAtTrue)).toBeLessThan(1e-9);
		const centre = input.binCentresCm;
		const errors = input.trueBin.map((b, w) => metric(centre[got.bin[w]], NaN, centre[b], NaN));
		expect(worstDifference(errors, want.mapErrorCm)).toBeLessThan(1e-9);
		const told = errorSummary(Float64Array.from(errors));
		const { median, mean, p95, fracWithin10, n } = want.metrics;
		expect(
			worstDifference(
				[told.medianCm, told.meanCm, told.p95Cm, told.fractionWithin10Cm],
				[median, mean, p95, fracWithin10]
			)
		).toBeLessThan(1e-9);
		expect(errors.length).toBe(n);
	});

	it.each([
		['even', expected.uniform],
		['time-spent', expected.occupancy]
	] as const)('covers as often as expected at every level with the %s prior', (prior, want) => {
		const model = modelOf(input.ratesHz, input.occupancyS, prior);
		const { store, isCovered, log2AtTrue } = decodeAll(
			model,
			input.counts,
			input.tauS,
			count,
			input.trueBin
		);
		const told = calibration(store.probabilities, trueBin);
		const levels = Object.entries(want.hpdCoverage).map(([level, share]) => [Number(level), share]);
		expect([...told.levels]).toEqual(levels.map(([level]) => level));
		expect(
			worstDifference(
				told.coverage,
				levels.map(([, share]) => share)
			)
		).toBeLessThan(1e-9);
		const covered = isCovered.reduce((sum, is) => sum + is, 0) / input.counts.length;
		expect(covered).toBeCloseTo(want.hpdCoverage['0.95'], 12);
		const unscorable = want.logPosteriorAtTrue.filter((value) => value === null).length;
		expect(told.unscorable).toBe(unscorable);
		expect(logScore(log2AtTrue).unscorable).toBe(unscorable);
	});

	it('gives the posterior the shape of the map when there is one unit', () => {
		const model = modelOf(input.ratesHz.slice(0, 1), input.occupancyS);
		const alone = input.counts.map((row) => row.slice(0, 1));
		const posteriors = posteriorsOf(model, alone, input.tauS);
		expected.singleUnitPosteriorFirst3.forEach((row, w) =>
			expect(worstDifference(posteriors[w], row)).toBeLessThan(1e-9)
		);
	});

	it('answers where the animal is as the matrix of both says', () => {
		const { bin } = decodeAll(
			modelOf(input.ratesHz, input.occupancyS),
			input.counts,
			input.tauS,
			count
		);
		const matrix = decodedAgainstTrue(trueBin, bin, count);
		expect(worstDifference(matrix, expected.decodedVsTrueRowNormalised.flat())).toBeLessThan(1e-9);
	});
});

describe('normalise', () => {
	it('gives the lowest place in a tie', () => {
		expect(normalise(Float64Array.of(1, 3, 3), new Float64Array(3)).best).toBe(1);
	});
});
