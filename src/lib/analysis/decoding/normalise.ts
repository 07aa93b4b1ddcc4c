/** Terms this far below the largest change a sum by less than a float can hold. */
const NEGLIGIBLE = 40;

/**
 * Turns log weights into probabilities.
 * @param logWeights any common constant may be missing; left as they are
 * @param out        probabilities, sum 1
 * @returns place of the largest weight (lowest in a tie) and ln Σ exp(logWeights)
 */
export function normalise(
	logWeights: Float64Array,
	out: Float64Array
): { best: number; logTotal: number } {
	let best = 0;
	for (let p = 1; p < logWeights.length; p++) if (logWeights[p] > logWeights[best]) best = p;
	const top = logWeights[best];
	let sum = 0;
	for (let p = 0; p < logWeights.length; p++) {
		const below = logWeights[p] - top;
		out[p] = below > -NEGLIGIBLE ? Math.exp(below) : 0;
		sum += out[p];
	}
	for (let p = 0; p < out.length; p++) out[p] /= sum;
	return { best, logTotal: top + Math.log(sum) };
}
