/** Straight line from a score to calibrated log odds, and how far the answer is then believed. */
export interface Calibration {
	readonly slope: number;
	readonly intercept: number;
	/**
	 * Factor on the log odds of the answer, prior included; 1 when left out. Priors that take rivals into
	 * account are sure too early, since each pair's evidence comes back to it through its rivals.
	 */
	readonly temper?: number;
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
 * Probability that a pair is one cell: 1/(1 + exp(−t (S′ + ln(π/(1 − π))))), S′ = slope · S + intercept,
 * t the temper.
 * @param score see `matchScore`
 * @param prior π, for example expected survival over the number of candidates
 * @throws RangeError prior outside [0, 1]
 */
export function matchProbability(
	score: number,
	prior: number,
	{ slope, intercept, temper = 1 }: Calibration = UNCALIBRATED
): number {
	if (!(prior >= 0 && prior <= 1)) throw new RangeError(`prior ${prior} is outside 0 to 1`);
	return logistic(temper * (slope * score + intercept + logOdds(prior)));
}
