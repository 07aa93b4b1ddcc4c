import {
	logistic,
	logOdds,
	matchProbability,
	UNCALIBRATED,
	type Calibration
} from './match-probability';

/** Pairs a person has decided, or whose truth is known. */
export interface LabelledPairs {
	readonly scores: Float64Array;
	/** Prior probability of each. */
	readonly priors: Float64Array;
	/** 1 for one cell, 0 for two. */
	readonly isSame: Uint8Array;
}

const MOST_STEPS = 50;
/** Pull of slope towards 1 and intercept towards 0, as a variance of 1 each, which keeps both finite
 * when score divides the labels without a mistake. */
const PULL = 1;

/** Pairs outside this range of probability are beyond doubt. */
const DOUBT = [0.02, 0.98] as const;
/** A smaller factor would turn evidence into none. */
const LEAST_TEMPER = 0.1;
/** With fewer doubtful pairs all pairs teach. */
const LEAST_PAIRS = 50;

/**
 * Logistic regression of the label on the score, the prior's log odds taken as known: slope and
 * intercept of `matchProbability`. Features are correlated and none is quite normal, so scores
 * cannot be taken at their word. Then one factor on the whole log odds, prior included: the temper.
 *
 * Only pairs in doubt under `start` teach, where the decisions are: the many that are sure either way
 * would bend the line to tails that change none. Choosing by score alone leaves the line unbiased.
 * Newton's method on the penalised likelihood, which has one top.
 * @param start calibration the priors were made with; repeat from the answer until it stands still
 * @returns slope 1, intercept 0 without pairs
 * @throws RangeError lengths differ
 */
export function fitCalibration(
	pairs: LabelledPairs,
	start: Calibration = UNCALIBRATED
): Calibration {
	const { scores, priors, isSame } = pairs;
	if (scores.length !== priors.length || scores.length !== isSame.length) {
		throw new RangeError(`lengths differ: ${scores.length}, ${priors.length} and ${isSame.length}`);
	}
	const all = [...scores.keys()];
	const doubtful = all.filter((k) => {
		const p = matchProbability(scores[k], priors[k], start);
		return p > DOUBT[0] && p < DOUBT[1];
	});
	const taught = doubtful.length >= LEAST_PAIRS ? doubtful : all;
	const line = fitLine(pairs, taught);
	return { ...line, temper: fitTemper(pairs, taught, line) };
}

/** The factor on the log odds under a line that makes the labels most likely, pulled towards 1. */
function fitTemper(
	{ scores, priors, isSame }: LabelledPairs,
	taught: readonly number[],
	{ slope, intercept }: Calibration
): number {
	let temper = 1;
	for (let step = 0; step < MOST_STEPS; step++) {
		let toTemper = PULL * (1 - temper);
		let curvature = PULL;
		for (const k of taught) {
			const odds = slope * scores[k] + intercept + logOdds(priors[k]);
			if (!Number.isFinite(odds)) continue;
			const p = logistic(temper * odds);
			toTemper += (isSame[k] - p) * odds;
			curvature += p * (1 - p) * odds * odds;
		}
		const by = Math.max(-0.5, Math.min(0.5, toTemper / curvature));
		temper = Math.max(LEAST_TEMPER, temper + by);
		if (Math.abs(by) < 1e-10) break;
	}
	return temper;
}

function fitLine(
	{ scores, priors, isSame }: LabelledPairs,
	taught: readonly number[]
): Calibration {
	let slope = 1;
	let intercept = 0;
	for (let step = 0; step < MOST_STEPS; step++) {
		let toSlope = PULL * (1 - slope);
		let toIntercept = -PULL * intercept;
		let ss = PULL;
		let si = 0;
		let ii = PULL;
		for (const k of taught) {
			const p = logistic(slope * scores[k] + intercept + logOdds(priors[k]));
			const weight = p * (1 - p);
			toSlope += (isSame[k] - p) * scores[k];
			toIntercept += isSame[k] - p;
			ss += weight * scores[k] * scores[k];
			si += weight * scores[k];
			ii += weight;
		}
		const determinant = ss * ii - si * si;
		const bySlope = (ii * toSlope - si * toIntercept) / determinant;
		const byIntercept = (ss * toIntercept - si * toSlope) / determinant;
		// A full step from far away can overshoot into where every weight is 0.
		const shorten = Math.min(1, 1 / Math.max(Math.abs(bySlope), Math.abs(byIntercept) / 4));
		slope += shorten * bySlope;
		intercept += shorten * byIntercept;
		if (Math.abs(bySlope) + Math.abs(byIntercept) < 1e-10) break;
	}
	return { slope, intercept };
}
