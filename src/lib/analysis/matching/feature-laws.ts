import { FEATURES, type Feature, type PairFeatures } from './pair-features';

/** A normal law. */
export interface Law {
	readonly mean: number;
	readonly sd: number;
}

/** How features are spread among pairs that are one cell, and among pairs that are two. */
export interface FeatureLaws {
	readonly same: Readonly<Record<Feature, Law>>;
	readonly different: Readonly<Record<Feature, Law>>;
}

/** Common practice, to begin with; `refineLaws` fits them to a lab's own pairs. */
export const STARTING_LAWS: FeatureLaws = {
	same: {
		waveformZ: { mean: 2.3, sd: 0.45 },
		logAmplitudeRatio: { mean: 0, sd: 0.18 },
		correlogramZ: { mean: 1.4, sd: 0.5 },
		logRateRatio: { mean: 0, sd: 0.5 },
		depthUm: { mean: 0, sd: 25 }
	},
	different: {
		waveformZ: { mean: 1.1, sd: 0.5 },
		logAmplitudeRatio: { mean: 0, sd: 0.55 },
		correlogramZ: { mean: 0.6, sd: 0.5 },
		logRateRatio: { mean: 0, sd: 1.1 },
		depthUm: { mean: 0, sd: 80 }
	}
};

function logDensity(value: number, { mean, sd }: Law): number {
	const z = (value - mean) / sd;
	return -Math.log(sd) - (z * z) / 2 - Math.log(2 * Math.PI) / 2;
}

/**
 * Log likelihood ratio of "the same cell" against "two cells", in nats: the sum over features of
 * ln N(f; same) − ln N(f; different). A feature that is NaN adds nothing.
 * Features are correlated, so the sum claims too much; `matchProbability` calibrates it.
 */
export function matchScore(features: PairFeatures, laws: FeatureLaws = STARTING_LAWS): number {
	let score = 0;
	for (const name of FEATURES) {
		const value = features[name];
		if (Number.isNaN(value)) continue;
		score += logDensity(value, laws.same[name]) - logDensity(value, laws.different[name]);
	}
	return score;
}
