import { describe, expect, it } from 'vitest';
import { decodeAll, modelOf, sparse } from '../../../../tests/factories/decoding';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { binsOf } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { seeded } from '../random/seeded';
import { mean } from '../statistics/mean';
import { median } from '../statistics/quantile';
import { denseTransition } from './dense-transition';
import { evidenceRows } from './evidence-rows';
import { memoryFilter } from './memory-filter';
import { mostProbablePath } from './most-probable-path';
import { randomWalk } from './random-walk';
import { smoothedBelief } from './smoothed-belief';
import { randomTransition, type Transition } from './transition';

/** Place with the largest probability of each row, lowest in a tie. */
const bestOfRows = (rows: Float64Array, places: number) =>
	Array.from({ length: rows.length / places }, (_, t) => {
		const row = rows.subarray(t * places, (t + 1) * places);
		return row.indexOf(Math.max(...row));
	});
const rowOf = (rows: Float64Array, t: number, places: number) =>
	rows.subarray(t * places, (t + 1) * places);

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

describe('forward, backward and the most probable path', () => {
	it('are right on three places and three windows (hand-worked)', () => {
		const { input, expected, tol } = referenceCase<
			{ A: number[][]; likelihoodRows: number[][] },
			{ logLikelihood: number; filtered: number[][]; smoothed: number[][]; viterbi: number[] }
		>('00_checks.json', 'd3');
		const step = denseTransition(Float64Array.from(input.A.flat(), Math.log));
		const prior = new Float64Array(3).fill(-Math.log(3));
		const evidence = Float64Array.from(input.likelihoodRows.flat(), Math.log);
		const told = smoothedBelief(prior, evidence, [null, step, step]);
		expect(told.use).toBe('offline');
		expect(Math.abs(told.logLikelihood - expected.logLikelihood)).toBeLessThan(tol);
		expect(worstDifference(told.filtered, expected.filtered.flat())).toBeLessThan(tol);
		expect(worstDifference(told.smoothed, expected.smoothed.flat())).toBeLessThan(tol);
		const path = mostProbablePath(prior, evidence, [null, step, step]);
		expect([...path.place]).toEqual(expected.viterbi);
	});

	interface WalkInput {
		binCentresCm: number[];
		length: number;
		sigmaCm: number;
		ratesHz: number[][];
		tauS: number;
		counts: number[][];
		trueBin: number[];
	}
	/** What the decoder leaves out of each window: Σ n ln τ − ln n!. */
	const leftOut = ({ counts, tauS }: WalkInput) =>
		counts.flat().reduce((sum, n) => {
			let logFactorial = 0;
			for (let k = 2; k <= n; k++) logFactorial += Math.log(k);
			return sum + n * Math.log(tauS) - logFactorial;
		}, 0);
	function walked(input: WalkInput, kind: string) {
		const count = input.binCentresCm.length;
		const arena = parseArena(`${kind}:${input.length}`);
		const bins = binsOf(arena, input.length / count);
		const metric = metricOf(arena);
		const model = modelOf(input.ratesHz, Array<number>(count).fill(1));
		const windows = input.counts.length;
		const evidence = evidenceRows(model, sparse(input.counts), input.tauS, 0, windows);
		const step = randomTransition(bins, model.bin, metric, input.sigmaCm);
		const steps = input.counts.map((_, t) => (t === 0 ? null : step));
		const filter = memoryFilter(model.logPrior);
		const walk = randomWalk(bins, model.bin, metric, input.sigmaCm);
		const causal = input.counts.map((_, t) => {
			const best = filter.step(rowOf(evidence, t, count), t === 0 ? null : walk);
			return { best, belief: filter.belief.slice() };
		});
		return {
			count,
			step,
			metric,
			model,
			causal,
			causalLogLikelihood: filter.logLikelihood() + leftOut(input),
			belief: smoothedBelief(model.logPrior, evidence, steps),
			path: mostProbablePath(model.logPrior, evidence, steps)
		};
	}

	it('equal the sum over all paths of a small case', () => {
		const { input, expected, tol } = referenceCase<
			WalkInput,
			{
				transition: number[][];
				logLikelihood: number;
				filtered: number[][];
				smoothed: number[][];
				viterbi: number[];
			}
		>('08_hmm.json', 'tiny_exact_enumeration');
		const { count, step, belief, path, causal, causalLogLikelihood } = walked(input, 'straight');
		expected.transition.forEach((row, from) => {
			const at = new Float64Array(count).fill(-Infinity);
			at[from] = 0;
			step.forward(at);
			expect(worstDifference(at.map(Math.exp), row)).toBeLessThan(tol);
		});
		expect(Math.abs(belief.logLikelihood + leftOut(input) - expected.logLikelihood)).toBeLessThan(
			tol
		);
		expect(Math.abs(causalLogLikelihood - expected.logLikelihood)).toBeLessThan(tol);
		expect(worstDifference(belief.filtered, expected.filtered.flat())).toBeLessThan(tol);
		expect(
			worstDifference(
				causal.flatMap((one) => [...one.belief]),
				expected.filtered.flat()
			)
		).toBeLessThan(tol);
		expect(worstDifference(belief.smoothed, expected.smoothed.flat())).toBeLessThan(tol);
		expect([...path.place]).toEqual(expected.viterbi);
	});

	it.each([
		['track_linear', 'straight'],
		['track_circular', 'ring']
	])('equal two other recursions in every figure of %s (scipy)', (id, kind) => {
		const { input, expected, tol } = referenceCase<
			WalkInput,
			{
				logLikelihood: number;
				filteredLast: number[];
				filteredMapBin: number[];
				smoothedMapBin: number[];
				smoothedRows: Record<string, number[]>;
				viterbi: number[];
				viterbiLogJoint: number;
				medianErrorCm: Record<'memoryless' | 'filtered' | 'smoothed', number>;
				meanErrorCm: Record<'memoryless' | 'filtered' | 'smoothed', number>;
			}
		>('08_hmm.json', id);
		const { count, belief, path, causal, causalLogLikelihood, metric, model } = walked(input, kind);
		expect(Math.abs(belief.logLikelihood + leftOut(input) - expected.logLikelihood)).toBeLessThan(
			tol
		);
		expect(Math.abs(causalLogLikelihood - expected.logLikelihood)).toBeLessThan(tol);
		const last = input.counts.length - 1;
		expect(
			worstDifference(rowOf(belief.filtered, last, count), expected.filteredLast)
		).toBeLessThan(tol);
		expect(worstDifference(causal[last].belief, expected.filteredLast)).toBeLessThan(tol);
		const filteredBin = bestOfRows(belief.filtered, count);
		const smoothedBin = bestOfRows(belief.smoothed, count);
		expect(filteredBin).toEqual(expected.filteredMapBin);
		expect(causal.map((one) => one.best)).toEqual(expected.filteredMapBin);
		expect(smoothedBin).toEqual(expected.smoothedMapBin);
		for (const [t, row] of Object.entries(expected.smoothedRows)) {
			const got = rowOf(belief.smoothed, Number(t), count);
			expect(worstDifference(got, row)).toBeLessThan(tol);
			// In logarithms nothing gets lost: figures of 1e-40 are right too.
			expect(worstDifference(got.map(Math.log), row.map(Math.log))).toBeLessThan(1e-8);
		}
		expect([...path.place]).toEqual(expected.viterbi);
		expect(Math.abs(path.logJoint + leftOut(input) - expected.viterbiLogJoint)).toBeLessThan(tol);
		const centre = input.binCentresCm;
		const errors = (answers: ArrayLike<number>) =>
			input.trueBin.map((b, t) => metric(centre[answers[t]], NaN, centre[b], NaN));
		const memoryless = decodeAll(model, input.counts, input.tauS, count).bin;
		for (const [name, answers] of [
			['memoryless', memoryless],
			['filtered', filteredBin],
			['smoothed', smoothedBin]
		] as const) {
			expect(median(errors(answers))).toBeCloseTo(expected.medianErrorCm[name], 9);
			expect(mean(errors(answers))).toBeCloseTo(expected.meanErrorCm[name], 9);
		}
	});

	/** A walk on a grid with a hole as the full matrix, cut like the separable one. */
	function gridAndMatrix(sigmaCm: number) {
		const arena = parseArena('rectangle:50x40');
		const bins = binsOf(arena, 10);
		const bin = Int32Array.from(Array(bins.count).keys()).filter((k) => k !== 7);
		const reach = Math.floor((4 * sigmaCm) / 10 + 0.5);
		const rows = new Float64Array(bin.length ** 2).fill(-Infinity);
		bin.forEach((a, from) => {
			const row = rows.subarray(from * bin.length, (from + 1) * bin.length);
			bin.forEach((b, to) => {
				const dx = (a % bins.binsX) - (b % bins.binsX);
				const dy = Math.floor(a / bins.binsX) - Math.floor(b / bins.binsX);
				if (Math.max(Math.abs(dx), Math.abs(dy)) > reach) return;
				row[to] = -(100 * (dx * dx + dy * dy)) / (2 * sigmaCm ** 2);
			});
			const total = Math.log(row.reduce((sum, log) => sum + Math.exp(log), 0));
			for (let to = 0; to < bin.length; to++) row[to] -= total;
		});
		return {
			grid: randomTransition(bins, bin, metricOf(arena), sigmaCm),
			full: denseTransition(rows)
		};
	}

	it.each([3, 6, 8])('take the same steps on a grid as the full matrix (σ %s cm)', (sigmaCm) => {
		const { grid, full } = gridAndMatrix(sigmaCm);
		const random = seeded(5);
		for (const spread of [3, 50, 4000]) {
			const v = Float64Array.from({ length: grid.places }, () => -spread * random.next());
			v[4] = -Infinity;
			const both = (name: 'forward' | 'backward') =>
				[grid, full].map((one) => {
					const out = v.slice();
					one[name](out);
					return out;
				});
			for (const name of ['forward', 'backward'] as const) {
				const [got, want] = both(name);
				expect(worstDifference(got, want)).toBeLessThan(1e-9);
			}
			const [best, wantBest] = [v.slice(), v.slice()];
			const [from, wantFrom] = [new Int32Array(v.length), new Int32Array(v.length)];
			grid.best(best, from);
			full.best(wantBest, wantFrom);
			expect(worstDifference(best, wantBest)).toBeLessThan(1e-9);
			expect(from).toEqual(wantFrom);
		}
	});

	it('hold on to a place that the window itself all but rules out', () => {
		// The second window speaks for the far place by 2000 nats; a linear recursion has lost it.
		const stay = Math.log(0.999);
		const go = Math.log(0.001);
		const step = denseTransition(Float64Array.of(stay, go, go, stay));
		const evidence = Float64Array.of(0, -900, -2000, 0, 0, 0);
		const even = new Float64Array(2).fill(-Math.LN2);
		const { smoothed, logLikelihood } = smoothedBelief(even, evidence, [null, step, step]);
		expect(smoothed.every(Number.isFinite)).toBe(true);
		expect(smoothed[0]).toBeCloseTo(1, 12);
		expect(smoothed[3]).toBeCloseTo(1, 12);
		expect(logLikelihood).toBeCloseTo(-Math.LN2 + go, 9);
	});

	it('treat stretches that begin anew as if each were decoded by itself', () => {
		const random = seeded(8);
		const rows = Array.from({ length: 5 }, () => Array.from({ length: 5 }, () => random.next()));
		const step = denseTransition(
			Float64Array.from(
				rows.flatMap((row) => row.map((p) => Math.log(p / row.reduce((a, b) => a + b))))
			)
		);
		const prior = new Float64Array(5).fill(-Math.log(5));
		const evidence = Float64Array.from({ length: 45 }, () => -6 * random.next());
		const at = (from: number, to: number, steps: (Transition | null)[]) => ({
			belief: smoothedBelief(prior, evidence.subarray(5 * from, 5 * to), steps),
			path: mostProbablePath(prior, evidence.subarray(5 * from, 5 * to), steps)
		});
		const walk = (count: number) =>
			Array.from({ length: count }, (_, t) => (t === 0 ? null : step));
		const whole = at(0, 9, [...walk(4), ...walk(5)]);
		const parts = [at(0, 4, walk(4)), at(4, 9, walk(5))];
		expect([...whole.belief.smoothed]).toEqual(parts.flatMap((one) => [...one.belief.smoothed]));
		expect([...whole.path.place]).toEqual(parts.flatMap((one) => [...one.path.place]));
		expect(whole.path.logJoint).toBeCloseTo(parts[0].path.logJoint + parts[1].path.logJoint, 12);
		expect(whole.belief.logLikelihood).toBeCloseTo(
			parts[0].belief.logLikelihood + parts[1].belief.logLikelihood,
			12
		);
	});

	it('refuse a matrix that is none, a walk without width and evidence that does not fit', () => {
		expect(() => denseTransition(new Float64Array(3))).toThrow(RangeError);
		expect(() => denseTransition(Float64Array.of(0, 0, 0, 0))).toThrow(RangeError);
		const arena = parseArena('straight:20');
		const bins = binsOf(arena, 10);
		expect(() => randomTransition(bins, Int32Array.of(0, 1), metricOf(arena), 0)).toThrow(
			RangeError
		);
		expect(() => smoothedBelief(new Float64Array(2), new Float64Array(3), [null])).toThrow(
			RangeError
		);
		expect(() => mostProbablePath(new Float64Array(2), new Float64Array(3), [null])).toThrow(
			RangeError
		);
	});
});
