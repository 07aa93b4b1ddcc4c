import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { binsOf } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { seeded } from '../random/seeded';
import { logSumExp } from '../statistics/log-sum-exp';
import { isInCredibleSet } from './credible-set';
import { decodeWindows, type Decoded } from './decode-windows';
import { memoryFilter } from './memory-filter';
import { normalise } from './normalise';
import { posteriorStore } from './posterior-store';
import { randomWalk } from './random-walk';
import { rateModel, type Prior, type RateModel } from './rate-model';
import type { WindowCounts } from './window-counts';

/** Counts per window and unit, stored as the decoder reads them. */
function sparse(counts: readonly (readonly number[])[]): WindowCounts {
	const first = [0];
	const unit: number[] = [];
	const spikes: number[] = [];
	for (const row of counts) {
		row.forEach((n, u) => {
			if (n === 0) return;
			unit.push(u);
			spikes.push(n);
		});
		first.push(unit.length);
	}
	return {
		first: Int32Array.from(first),
		unit: Int32Array.from(unit),
		spikes: Float64Array.from(spikes)
	};
}

function modelOf(
	rates: readonly number[][],
	occupancyS: readonly number[],
	prior: Prior
): RateModel {
	const model = rateModel(
		Float64Array.from(rates.flat()),
		Float64Array.from(occupancyS),
		() => true,
		prior
	);
	if (!model) throw new Error('no place to answer');
	return model;
}

function decodeAll(
	model: RateModel,
	counts: readonly (readonly number[])[],
	tauS: number,
	bins: number,
	trueBin = counts.map(() => 0)
) {
	const out: Decoded = {
		bin: new Int32Array(counts.length),
		log2AtTrue: new Float64Array(counts.length),
		isCovered: new Uint8Array(counts.length)
	};
	const store = posteriorStore(counts.length, bins);
	const evidence: Float64Array[] = [];
	const fold = { from: 0, to: counts.length, startS: 0, stopS: 0 };
	decodeWindows(model, fold, sparse(counts), tauS, Int32Array.from(trueBin), out, store, (_, e) =>
		evidence.push(e.slice())
	);
	return { ...out, store, evidence };
}

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

	it('takes the time spent as prior when asked', () => {
		const { store } = decodeAll(modelOf(rates, [8, 2], 'time-spent'), [[0, 0]], 0.25, 2);
		expect(store.probabilities[0]).toBeCloseTo(0.595390324808, 7);
	});

	it('survives 400 units in 2 s, where every product of probabilities underflows (scipy)', () => {
		const { input, expected } = referenceCase<
			{ counts: number[]; tauS: number },
			{ logPosterior: number[]; mapBin: number }
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
	mapErrorCm: number[];
	hpdCoverage: Record<string, number>;
	logPosteriorAtTrue: (number | null)[];
}

describe.each([
	['poisson_linear', 'straight'],
	['poisson_circular', 'ring']
])('decoder of %s (scipy.stats.poisson)', (id, kind) => {
	const { input, expected } = referenceCase<
		DecoderInput,
		{ uniform: DecoderExpected; occupancy: DecoderExpected }
	>('06_decoder.json', id);
	const bins = input.occupancyS.length;
	const metric = metricOf(parseArena(`${kind}:${input.length}`));

	it.each([
		['even', expected.uniform],
		['time-spent', expected.occupancy]
	] as const)('agrees with the %s prior', (prior, want) => {
		const model = modelOf(input.ratesHz, input.occupancyS, prior);
		const got = decodeAll(model, input.counts, input.tauS, bins, input.trueBin);
		want.posteriorFirst5.forEach((row, w) => {
			const posterior = got.store.probabilities.subarray(w * bins, (w + 1) * bins);
			expect(worstDifference(posterior, row)).toBeLessThan(1e-7);
		});
		expect([...got.bin]).toEqual(want.mapBin);
		const logAtTrue = got.log2AtTrue.map((bits) => bits * Math.LN2);
		expect(worstDifference(logAtTrue, want.logPosteriorAtTrue)).toBeLessThan(1e-9);
		const covered = got.isCovered.reduce((sum, is) => sum + is, 0) / input.counts.length;
		expect(covered).toBeCloseTo(want.hpdCoverage['0.95'], 12);
		const centre = input.binCentresCm;
		const errors = input.trueBin.map((b, w) => metric(centre[got.bin[w]], NaN, centre[b], NaN));
		expect(worstDifference(errors, want.mapErrorCm)).toBeLessThan(1e-9);
	});
});

describe('isInCredibleSet', () => {
	it('grows by the most probable place first (hand-worked)', () => {
		const p = Float64Array.of(0.5, 0.3, 0.15, 0.05);
		const sizeAt = (level: number) =>
			[0, 1, 2, 3].filter((k) => isInCredibleSet(p, k, level)).length;
		expect([0.5, 0.8, 0.9, 0.96].map(sizeAt)).toEqual([1, 2, 3, 4]);
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

describe('decoder with memory', () => {
	it('is the forward recursion of a hidden Markov model (hand-worked)', () => {
		const a = [
			[0.8, 0.2, 0],
			[0.1, 0.8, 0.1],
			[0, 0.2, 0.8]
		];
		const walk = (belief: Float64Array) =>
			belief.set([0, 1, 2].map((to) => belief.reduce((sum, p, from) => sum + p * a[from][to], 0)));
		const likelihoods = [
			[0.5, 0.1, 0.1],
			[0.4, 0.3, 0.1],
			[0.1, 0.2, 0.7]
		];
		const filter = memoryFilter(new Float64Array(3).fill(-Math.log(3)));
		likelihoods.forEach((row, t) =>
			filter.step(Float64Array.from(row, Math.log), t === 0 ? null : walk)
		);
		expect(filter.logLikelihood()).toBeCloseTo(-4.330573353085, 11);
		expect(worstDifference(filter.belief, [0.3475177305, 0.4184397163, 0.2340425532])).toBeLessThan(
			1e-9
		);
	});

	it.each([
		['tiny_exact_enumeration', 'straight'],
		['track_linear', 'straight'],
		['track_circular', 'ring']
	])('equals a log-domain recursion and the sum over all paths in %s', (id, kind) => {
		const { input, expected } = referenceCase<
			{
				binCentresCm: number[];
				length: number;
				sigmaCm: number;
				ratesHz: number[][];
				tauS: number;
				counts: number[][];
			},
			{
				logLikelihood: number;
				filtered?: number[][];
				filteredLast?: number[];
				filteredMapBin?: number[];
			}
		>('08_hmm.json', id);
		const count = input.binCentresCm.length;
		const arena = parseArena(`${kind}:${input.length}`);
		const bins = binsOf(arena, input.length / count);
		const model = modelOf(input.ratesHz, Array<number>(count).fill(1), 'even');
		const { evidence } = decodeAll(model, input.counts, input.tauS, count);
		const walk = randomWalk(bins, model.bin, metricOf(arena), input.sigmaCm);
		const filter = memoryFilter(model.logPrior);
		const answers = evidence.map((e, t) => {
			const best = filter.step(e, t === 0 ? null : walk);
			if (expected.filtered)
				expect(worstDifference(filter.belief, expected.filtered[t])).toBeLessThan(1e-10);
			return best;
		});
		if (expected.filteredMapBin) expect(answers).toEqual(expected.filteredMapBin);
		if (expected.filteredLast)
			expect(worstDifference(filter.belief, expected.filteredLast)).toBeLessThan(1e-8);
		// What the decoder leaves out of each window: Σ n ln τ − ln n!.
		const left = input.counts.flat().reduce((sum, n) => {
			let logFactorial = 0;
			for (let k = 2; k <= n; k++) logFactorial += Math.log(k);
			return sum + n * Math.log(input.tauS) - logFactorial;
		}, 0);
		expect(filter.logLikelihood() + left).toBeCloseTo(expected.logLikelihood, 8);
	});

	it('walks a grid as the full transition matrix does, nothing leaking at walls and holes', () => {
		const arena = parseArena('rectangle:50x40');
		const bins = binsOf(arena, 10);
		const bin = Int32Array.from(Array(bins.count).keys()).filter((k) => k !== 7);
		const metric = metricOf(arena);
		const belief = new Float64Array(bin.length);
		belief[5] = 0.75;
		belief[11] = 0.25;
		const weight = (a: number, b: number) => {
			const d = metric(
				bins.centreXCm[bin[a]],
				bins.centreYCm[bin[a]],
				bins.centreXCm[bin[b]],
				bins.centreYCm[bin[b]]
			);
			return Math.exp(-(d * d) / (2 * 8 * 8));
		};
		const expected = Float64Array.from(bin, (_, to) =>
			belief.reduce((sum, p, from) => {
				const row = bin.reduce((total, _bin, other) => total + weight(from, other), 0);
				return sum + (p * weight(from, to)) / row;
			}, 0)
		);
		randomWalk(bins, bin, metric, 8)(belief);
		// The grid cuts the kernel at 4 σ along each axis, here 3 bins.
		expect(worstDifference(belief, expected)).toBeLessThan(2e-3);
		expect(belief.reduce((sum, p) => sum + p, 0)).toBeCloseTo(1, 12);
	});
});

describe('normalise', () => {
	it('gives the lowest place in a tie', () => {
		expect(normalise(Float64Array.of(1, 3, 3), new Float64Array(3)).best).toBe(1);
	});
});
