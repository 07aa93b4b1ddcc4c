import { describe, expect, it } from 'vitest';
import { referenceCase } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { shuffled } from '../random/shuffled';
import { assignPairs } from './assign-pairs';
import { expectedPresence } from './expected-presence';
import { matchScore, STARTING_LAWS, type FeatureLaws } from './feature-laws';
import { fitCalibration } from './fit-calibration';
import { matchCorrelogram } from './match-correlogram';
import { logistic, matchProbability } from './match-probability';
import { FEATURES, pairFeatures, type Feature, type PairFeatures } from './pair-features';
import { refineLaws } from './refine-laws';
import { rivalPriors } from './rival-priors';

const NOTHING: PairFeatures = {
	waveformZ: NaN,
	logAmplitudeRatio: NaN,
	correlogramZ: NaN,
	logRateRatio: NaN,
	depthUm: NaN
};

type ReferenceName = 'waveformZ' | 'logAmpRatio' | 'acgZ' | 'logRateRatio' | 'depthDiffUm';
const REFERENCE_NAMES: Record<Feature, ReferenceName> = {
	waveformZ: 'waveformZ',
	logAmplitudeRatio: 'logAmpRatio',
	correlogramZ: 'acgZ',
	logRateRatio: 'logRateRatio',
	depthUm: 'depthDiffUm'
};
const featuresOf = (listed: Record<ReferenceName, number>): PairFeatures => ({
	waveformZ: listed.waveformZ,
	logAmplitudeRatio: listed.logAmpRatio,
	correlogramZ: listed.acgZ,
	logRateRatio: listed.logRateRatio,
	depthUm: listed.depthDiffUm
});

describe('pairFeatures', () => {
	const unit = (uv: number[], correlogram: number[], rateHz: number, depthUm = NaN) => ({
		waveform: { uv: Float64Array.from(uv), channels: 2 },
		correlogram: Float64Array.from(correlogram),
		rateHz,
		depthUm
	});

	it('compares shape over all channels, size, correlogram, rate and depth (by hand)', () => {
		const a = unit([0, -8, 2, 0, -4, 1], [1, 2, 4], 2, 1500);
		const b = unit([0, -4, 1, 0, -2, 0.5], [1, 2, 3], 1, 1520);
		const got = pairFeatures(a, b);
		expect(got.waveformZ).toBeCloseTo(Math.atanh(0.999999), 9);
		expect(got.logAmplitudeRatio).toBeCloseTo(Math.log(0.5), 12);
		// r of (1 2 4) and (1 2 3) is 3/√(14/3 · 2).
		expect(got.correlogramZ).toBeCloseTo(Math.atanh(3 / Math.sqrt(28 / 3)), 12);
		expect(got.logRateRatio).toBeCloseTo(Math.log(0.5), 12);
		expect(got.depthUm).toBe(20);
	});

	it('turns its ratios and depth round when the days change places', () => {
		const a = unit([0, -8, 2, 0, -4, 1], [1, 2, 4], 2, 1500);
		const b = unit([0, -5, 3, 0, -2, 0.5], [1, 3, 3], 1, 1520);
		const there = pairFeatures(a, b);
		const back = pairFeatures(b, a);
		expect(back.waveformZ).toBeCloseTo(there.waveformZ, 12);
		expect(back.correlogramZ).toBeCloseTo(there.correlogramZ, 12);
		expect(back.logAmplitudeRatio).toBeCloseTo(-there.logAmplitudeRatio, 12);
		expect(back.logRateRatio).toBeCloseTo(-there.logRateRatio, 12);
		expect(back.depthUm).toBe(-20);
	});

	it('leaves open what cannot be told: no correlogram, no spikes, a flat waveform, no depth', () => {
		const silent = unit([0, 0, 0, 0, 0, 0], [], 0);
		expect(pairFeatures(unit([0, -8, 2, 0, -4, 1], [1, 2, 4], 2, 5), silent)).toEqual(NOTHING);
	});

	it('refuses waveforms of different length', () => {
		const a = unit([0, -8, 2, 0], [1], 1);
		expect(() => pairFeatures(a, unit([0, -8], [1], 1))).toThrow(RangeError);
	});
});

describe('matchCorrelogram', () => {
	it('keeps the number of pairs, spreads them over lag, and gives nothing of few', () => {
		const counts = new Float64Array(40);
		counts[18] = 100;
		counts[21] = 100;
		const smooth = matchCorrelogram(counts);
		expect(smooth.reduce((sum, value) => sum + value, 0)).toBeCloseTo(200, 9);
		expect(smooth[19]).toBeGreaterThan(10);
		expect(counts[19]).toBe(0);
		counts[18] = 99;
		counts[21] = 100;
		expect(matchCorrelogram(counts)).toHaveLength(0);
	});
});

describe('matchScore', () => {
	it('equals scipy norm.logpdf for every listed pair, and its probability at a prior of 0.2', () => {
		const { input, expected } = referenceCase<
			{ same_mean_sd: Record<ReferenceName, [number, number]> },
			{ features: Record<ReferenceName, number>; llr: number; posteriorAtPrior0_2: number }[]
		>('13_matching.json', 'likelihood_ratio');
		for (const name of FEATURES) {
			const [mean, sd] = input.same_mean_sd[REFERENCE_NAMES[name]];
			expect(STARTING_LAWS.same[name]).toEqual({ mean, sd });
		}
		for (const { features, llr, posteriorAtPrior0_2 } of expected) {
			const score = matchScore(featuresOf(features));
			expect(Math.abs(score - llr)).toBeLessThan(1e-9);
			expect(Math.abs(matchProbability(score, 0.2) - posteriorAtPrior0_2)).toBeLessThan(1e-9);
		}
	});

	it('is 2.3775 for a waveform of 2.0 and 20 µm, others unknown, and 0.7293 at 0.2 (closed form)', () => {
		const score = matchScore({ ...NOTHING, waveformZ: 2, depthUm: 20 });
		expect(score).toBeCloseTo(2.377539103241, 11);
		expect(matchProbability(score, 0.2)).toBeCloseTo(0.729333712105, 11);
	});

	it('is nothing for or against when nothing is known', () => {
		expect(matchScore(NOTHING)).toBe(0);
		expect(matchProbability(0, 0.3)).toBeCloseTo(0.3, 12);
	});
});

describe('matchProbability', () => {
	it('is certain only of certain priors, and refuses what is no probability', () => {
		expect(matchProbability(50, 0)).toBe(0);
		expect(matchProbability(-50, 1)).toBe(1);
		expect(() => matchProbability(1, 1.2)).toThrow(RangeError);
		expect(() => matchProbability(1, NaN)).toThrow(RangeError);
	});

	it('follows slope and intercept', () => {
		const got = matchProbability(4, 0.5, { slope: 0.5, intercept: -1 });
		expect(got).toBeCloseTo(logistic(1), 12);
	});
});

describe('fitCalibration', () => {
	const labelled = (count: number, slope: number, intercept: number, seed: number) => {
		const random = seeded(seed);
		const scores = Float64Array.from({ length: count }, () => 16 * random.next() - 8);
		const priors = scores.map(() => 0.1 + 0.5 * random.next());
		const isSame = Uint8Array.from(scores, (score, k) =>
			random.next() < matchProbability(score, priors[k], { slope, intercept }) ? 1 : 0
		);
		return { scores, priors, isSame };
	};

	it('finds the line that labels were drawn with, though only doubtful pairs teach', () => {
		const got = fitCalibration(labelled(20000, 0.6, -0.8, 3));
		expect(Math.abs(got.slope - 0.6)).toBeLessThan(0.05);
		expect(Math.abs(got.intercept + 0.8)).toBeLessThan(0.1);
		// Labels that follow the line need no tempering.
		expect(Math.abs((got.temper ?? NaN) - 1)).toBeLessThan(0.03);
	});

	it('tempers answers that are too sure of their priors', () => {
		const { scores, priors } = labelled(20000, 1, 0, 4);
		const random = seeded(5);
		const isSame = Uint8Array.from(scores, (score, k) =>
			random.next() < matchProbability(score, priors[k], { slope: 1, intercept: 0, temper: 0.7 })
				? 1
				: 0
		);
		const surer = priors.map((prior) => prior ** 2 / (prior ** 2 + (1 - prior) ** 2));
		const got = fitCalibration({ scores, priors: surer, isSame });
		expect(got.temper).toBeLessThan(0.95);
	});

	it('takes the temper as a factor on the log odds (hand-worked)', () => {
		// Odds of 4 become √4 = 2 at a temper of ½.
		const half = { slope: 1, intercept: 0, temper: 0.5 };
		expect(matchProbability(0, 0.8, half)).toBeCloseTo(2 / 3, 12);
		expect(matchProbability(0, 0.5, half)).toBe(0.5);
	});

	it('stays finite when scores divide the labels without a mistake, and plain without pairs', () => {
		const scores = Float64Array.of(-3, -2, -1, 1, 2, 3);
		const priors = new Float64Array(6).fill(0.5);
		const got = fitCalibration({ scores, priors, isSame: Uint8Array.of(0, 0, 0, 1, 1, 1) });
		expect(got.slope).toBeGreaterThan(1);
		expect(got.slope).toBeLessThan(4);
		const none = new Float64Array(0);
		const plain = fitCalibration({ scores: none, priors: none, isSame: new Uint8Array(0) });
		expect(plain).toEqual({ slope: 1, intercept: 0, temper: 1 });
	});

	it('refuses labels that do not fit the scores', () => {
		const one = Float64Array.of(0.5);
		expect(() => fitCalibration({ scores: one, priors: one, isSame: new Uint8Array(2) })).toThrow(
			RangeError
		);
	});
});

describe('refineLaws', () => {
	/** Draws from laws other than the starting ones. */
	const truth: FeatureLaws = {
		same: { ...STARTING_LAWS.same, waveformZ: { mean: 2.8, sd: 0.3 } },
		different: { ...STARTING_LAWS.different, waveformZ: { mean: 1.5, sd: 0.3 } }
	};
	const random = seeded(12);
	const draw = (laws: FeatureLaws['same']): PairFeatures => {
		const normal = () =>
			Math.sqrt(-2 * Math.log(1 - random.next())) * Math.cos(2 * Math.PI * random.next());
		const made = { ...NOTHING };
		const entries = FEATURES.map((name) => [name, laws[name].mean + laws[name].sd * normal()]);
		return Object.assign(made, Object.fromEntries(entries));
	};
	const features = Array.from({ length: 8000 }, (_, k) =>
		draw(k % 5 === 0 ? truth.same : truth.different)
	);
	const priors = new Float64Array(8000).fill(0.2);

	it('finds the laws that unlabelled pairs come from', () => {
		const { laws, hasSettled, pairsSame } = refineLaws({ features, priors }, STARTING_LAWS);
		expect(hasSettled).toBe(true);
		expect(Math.abs(pairsSame - 1600)).toBeLessThan(80);
		for (const name of FEATURES) {
			for (const kind of ['same', 'different'] as const) {
				const { mean, sd } = truth[kind][name];
				expect(Math.abs(laws[kind][name].mean - mean)).toBeLessThan(0.12 * sd);
				// 1600 pairs known to be the same would give standard errors of 0.025 sd and 0.018 sd.
				expect(Math.abs(laws[kind][name].sd / sd - 1)).toBeLessThan(0.12);
			}
		}
	});

	it('takes what two cells look like from pairs that cannot be one, where there are any', () => {
		const known = features.filter((_, k) => k % 5 !== 0);
		const { laws } = refineLaws({ features, priors }, STARTING_LAWS, known);
		const values = known.map(({ waveformZ }) => waveformZ);
		const sum = values.reduce((total, value) => total + value, 0);
		// The starting law counts as ten pairs.
		expect(laws.different.waveformZ.mean).toBeCloseTo((sum + 10 * 1.1) / (6400 + 10), 9);
	});

	it('stays with the starting laws where there are no pairs, or a feature is never known', () => {
		const none = refineLaws({ features: [], priors: new Float64Array(0) }, STARTING_LAWS);
		expect(none.laws).toEqual(STARTING_LAWS);
		const blind = features.map((pair) => ({ ...pair, depthUm: NaN }));
		const { laws } = refineLaws({ features: blind, priors }, STARTING_LAWS);
		expect(laws.same.depthUm.mean).toBe(0);
		expect(laws.same.depthUm.sd).toBeCloseTo(25, 12);
	});
});

describe('assignPairs', () => {
	const flat = (rows: readonly (readonly number[])[]) => Float64Array.from(rows.flat());

	it.each(['assignment_0_4x4', 'assignment_1_3x5', 'assignment_2_6x4'])(
		'equals scipy linear_sum_assignment in %s',
		(id) => {
			const { input, expected } = referenceCase<
				{ llr: number[][]; threshold: number },
				{ pairs: [number, number][]; totalGain: number; unmatchedRows: number[] }
			>('13_matching.json', id);
			const rows = input.llr.length;
			const got = assignPairs(flat(input.llr), rows, input.llr[0].length, input.threshold);
			expect(got.pairs).toEqual(expected.pairs);
			expect(got.totalGain).toBeCloseTo(expected.totalGain, 9);
			const matched = got.pairs.map(([row]) => row);
			const unmatched = [...Array(rows).keys()].filter((row) => !matched.includes(row));
			expect(unmatched).toEqual(expected.unmatchedRows);
		}
	);

	it.each(['hungarian_cost_0_5x5', 'hungarian_cost_1_4x7'])(
		'finds the cheapest assignment of %s when gain is what is saved',
		(id) => {
			const { input, expected } = referenceCase<
				{ cost: number[][] },
				{ rows: number[]; cols: number[]; total: number }
			>('13_matching.json', id);
			const saved = flat(input.cost).map((cost) => 1000 - cost);
			const { pairs, totalGain } = assignPairs(saved, input.cost.length, input.cost[0].length, 0);
			expect(pairs).toEqual(expected.rows.map((row, k) => [row, expected.cols[k]]));
			expect(1000 * pairs.length - totalGain).toBeCloseTo(expected.total, 9);
		}
	);

	it('gains 4 where taking the largest first would gain 3 (by hand)', () => {
		const scores = Float64Array.of(4, 1, -2, 3.5, 2, 0, -1, -3, 0.5);
		const got = assignPairs(scores, 3, 3, 1);
		expect(got.pairs).toEqual([
			[0, 0],
			[1, 1]
		]);
		expect(got.totalGain).toBe(4);
	});

	it('gains the same in whatever order rows and columns come (100 random tables)', () => {
		const random = seeded(9);
		for (let k = 0; k < 100; k++) {
			const rows = 1 + random.below(6);
			const columns = 1 + random.below(6);
			const scores = Float64Array.from({ length: rows * columns }, () => 8 * random.next() - 4);
			const r = shuffled(rows, random);
			const c = shuffled(columns, random);
			const mixed = scores.map(
				(_, at) => scores[r[Math.floor(at / columns)] * columns + c[at % columns]]
			);
			const plain = assignPairs(scores, rows, columns, 0.5);
			const again = assignPairs(mixed, rows, columns, 0.5);
			expect(again.totalGain).toBeCloseTo(plain.totalGain, 9);
			const back = again.pairs.map(([row, column]) => [r[row], c[column]]);
			expect(back.sort(([a], [b]) => a - b)).toEqual(plain.pairs);
		}
	});

	it('never makes a pair that may not be, copes with empty sides, and refuses NaN', () => {
		const never = new Float64Array(4).fill(-Infinity);
		expect(assignPairs(never, 2, 2, 0)).toEqual({ pairs: [], totalGain: 0 });
		expect(assignPairs(new Float64Array(0), 0, 3, 0).pairs).toEqual([]);
		expect(assignPairs(new Float64Array(0), 3, 0, 0).pairs).toEqual([]);
		expect(() => assignPairs(Float64Array.of(NaN), 1, 1, 0)).toThrow(RangeError);
		expect(() => assignPairs(Float64Array.of(1), 1, 2, 0)).toThrow(RangeError);
	});
});

describe('expectedPresence', () => {
	it('falls faster than survival when a cell was not seen between (by hand)', () => {
		expect(expectedPresence(1, 0.8, 0.1)).toBeCloseTo(0.72, 12);
		// Unseen yesterday: there with 0.08 of 0.28; then 0.8 to stay and 0.9 to be seen.
		expect(expectedPresence(2, 0.8, 0.1)).toBeCloseTo((0.08 / 0.28) * 0.8 * 0.9, 12);
		expect(expectedPresence(3, 0.8, 0.1)).toBeCloseTo(0.0207194, 6);
		expect(expectedPresence(2, 0.8, 0)).toBe(0);
	});
});

describe('rivalPriors', () => {
	/** Marginals by adding up every one-to-one pairing. */
	function exact(weights: number[][]): number[][] {
		const sums = weights.map((row) => row.map(() => 0));
		let all = 0;
		const walk = (row: number, taken: number[], weight: number) => {
			if (row === weights.length) {
				all += weight;
				taken.forEach((column, r) => {
					if (column >= 0) sums[r][column] += weight;
				});
				return;
			}
			walk(row + 1, [...taken, -1], weight);
			weights[row].forEach((w, column) => {
				if (!taken.includes(column)) walk(row + 1, [...taken, column], weight * w);
			});
		};
		walk(0, [], 1);
		return sums.map((row) => row.map((sum) => sum / all));
	}
	const marginals = (ratios: Float64Array, priors: Float64Array, presences: Float64Array) =>
		rivalPriors(ratios, priors, presences).map((prior, at) => {
			const odds = (ratios[at] * prior) / (1 - prior);
			return odds / (1 + odds);
		});

	it('are plain priors for one unit a side, and sum of all pairings for a single earlier unit', () => {
		const alone = rivalPriors(Float64Array.of(7), Float64Array.of(0.6), Float64Array.of(0.6));
		expect(alone[0]).toBeCloseTo(0.6, 12);
		const got = marginals(
			Float64Array.of(9, 0.5, 2),
			new Float64Array(3).fill(0.25),
			Float64Array.of(0.75)
		);
		expect([...got].map((p) => p.toFixed(12))).toEqual(
			exact([[9, 0.5, 2]])[0].map((p) => p.toFixed(12))
		);
	});

	it('come close to the sum over every pairing (200 random tables of 3 by 4)', () => {
		const random = seeded(21);
		let worst = 0;
		let sum = 0;
		for (let k = 0; k < 200; k++) {
			const ratios = Float64Array.from({ length: 12 }, () => Math.exp(8 * random.next() - 5));
			const presences = new Float64Array(3).fill(0.5);
			const got = marginals(ratios, new Float64Array(12).fill(0.5), presences);
			const want = exact([0, 4, 8].map((at) => [...ratios.subarray(at, at + 4)])).flat();
			got.forEach((p, at) => {
				worst = Math.max(worst, Math.abs(p - want[at]));
				sum += Math.abs(p - want[at]);
			});
		}
		// Belief propagation is exact without cycles and close with them.
		expect(worst).toBeLessThan(0.1);
		expect(sum / 2400).toBeLessThan(0.01);
	});

	it('take from a pair whose member has a better partner, and leave no candidate without prior', () => {
		const got = marginals(
			Float64Array.of(1000, 20, 0, 20),
			new Float64Array(4).fill(0.36),
			Float64Array.of(0.72, 0.72)
		);
		expect(got[0]).toBeGreaterThan(0.95);
		expect(got[1]).toBeLessThan(0.05);
		expect(got[2]).toBe(0);
		expect(got[3]).toBeGreaterThan(0.9);
		expect(rivalPriors(new Float64Array(0), new Float64Array(0), new Float64Array(0))).toHaveLength(
			0
		);
	});
});
