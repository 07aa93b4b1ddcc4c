/** Straight line from a score to calibrated log odds. */
export interface Calibration {
	readonly slope: number;
	readonly intercept: number;
}

/** Takes the score at its word. */
export const UNCALIBRATED: Calibration = { slope: 1, intercept: 0 };

/** ln(p/(1 − p)). */
export function logOdds(probability: number): number {
	return Math.log(probability / (1 - probability));
}

/** 1/(1 + exp(−x)). */
export function logistic(x: number): number {
	return 1 / (1 + Math.exp(-x));
}

/**
 * Probability that a pair is one cell: 1/(1 + exp(−(S′ + ln(π/(1 − π))))), S′ = slope · S + intercept.
 * @param score see `matchScore`
 * @param prior π, for example expected survival over the number of candidates
 * @throws RangeError prior outside [0, 1]
 */
export function matchProbability(
	score: number,
	prior: number,
	{ slope, intercept }: Calibration = UNCALIBRATED
): number {
	if (!(prior >= 0 && prior <= 1)) throw new RangeError(`prior ${prior} is outside 0 to 1`);
	return logistic(slope * score + intercept + logOdds(prior));
}
