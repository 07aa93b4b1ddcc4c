import { matchScore, type FeatureLaws, type Law } from './feature-laws';
import { matchProbability } from './match-probability';
import { FEATURES, type Feature, type PairFeatures } from './pair-features';

/** Candidate pairs of unknown truth. */
export interface CandidatePairs {
	readonly features: readonly PairFeatures[];
	/** Prior probability of each. */
	readonly priors: Float64Array;
}

/** Laws fitted to a lab's own pairs. */
export interface RefinedLaws {
	readonly laws: FeatureLaws;
	readonly rounds: number;
	readonly hasSettled: boolean;
	/** Sum of the probabilities: about how many pairs the law of "one cell" stands on. */
	readonly pairsSame: number;
}

/** The starting laws count as this many pairs, so that few pairs cannot bend them. */
const STARTING_PAIRS = 10;
const MOST_ROUNDS = 50;

/**
 * Fits the laws of features to the pairs of a lab by expectation and maximisation: weigh every pair by
 * its probability under the laws of the round before, take weighted means and standard deviations (n), the
 * starting laws counting as 10 pairs. Pairs that are sure weigh most; keeping only those would cut
 * the tails off the law of "one cell" and make it too narrow. Features that are NaN are left out one
 * by one.
 * @param knownDifferent pairs that cannot be one cell: different units of one day, or units of
 * different bundles. Given any, they alone teach what "two cells" look like.
 * Cost: O(rounds · pairs).
 */
export function refineLaws(
	candidates: CandidatePairs,
	start: FeatureLaws,
	knownDifferent: readonly PairFeatures[] = []
): RefinedLaws {
	const { features, priors } = candidates;
	const known = new Float64Array(knownDifferent.length).fill(1);
	const fixed = knownDifferent.length > 0 ? fitLaws(knownDifferent, known, start.different) : null;
	let laws: FeatureLaws = { same: start.same, different: fixed ?? start.different };
	const asSame = new Float64Array(features.length);
	const asDifferent = new Float64Array(features.length);
	let before = NaN;
	for (let round = 1; ; round++) {
		features.forEach((pair, k) => {
			const p = matchProbability(matchScore(pair, laws), priors[k]);
			asSame[k] = p;
			asDifferent[k] = 1 - p;
		});
		const same = fitLaws(features, asSame, start.same);
		laws = { same, different: fixed ?? fitLaws(features, asDifferent, start.different) };
		const now = fingerprint(laws);
		const hasSettled = Math.abs(now - before) < 1e-9;
		if (hasSettled || round === MOST_ROUNDS) {
			const pairsSame = asSame.reduce((sum, weight) => sum + weight, 0);
			return { laws, rounds: round, hasSettled, pairsSame };
		}
		before = now;
	}
}

function fitLaws(
	features: readonly PairFeatures[],
	weights: Float64Array,
	start: Readonly<Record<Feature, Law>>
): Record<Feature, Law> {
	const fitted = { ...start };
	for (const name of FEATURES) {
		const { mean: from, sd } = start[name];
		let total = STARTING_PAIRS;
		let sum = STARTING_PAIRS * from;
		features.forEach((pair, k) => {
			if (Number.isNaN(pair[name])) return;
			total += weights[k];
			sum += weights[k] * pair[name];
		});
		const mean = sum / total;
		let squares = STARTING_PAIRS * sd * sd;
		features.forEach((pair, k) => {
			if (!Number.isNaN(pair[name])) squares += weights[k] * (pair[name] - mean) ** 2;
		});
		fitted[name] = { mean, sd: Math.sqrt(squares / total) };
	}
	return fitted;
}

/** One number that stands still when every law does. */
function fingerprint({ same, different }: FeatureLaws): number {
	let sum = 0;
	for (const name of FEATURES) {
		sum += same[name].mean + 2 * same[name].sd + 3 * different[name].mean + 5 * different[name].sd;
	}
	return sum;
}
