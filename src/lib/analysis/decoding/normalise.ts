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
	const scale = 1 / sum;
	for (let p = 0; p < out.length; p++) out[p] *= scale;
	return { best, logTotal: top + Math.log(sum) };
}

/**
 * Place of the largest of `a − b` (lowest in a tie) and ln Σ exp(a − b), without keeping either.
 * @param b same length as a
 */
export function normaliserOfDifference(
	a: Float64Array,
	b: Float64Array
): { best: number; logTotal: number } {
	let best = 0;
	let top = -Infinity;
	for (let p = 0; p < a.length; p++) {
		const value = a[p] - b[p];
		if (value > top) {
			top = value;
			best = p;
		}
	}
	let sum = 0;
	for (let p = 0; p < a.length; p++) {
		const below = a[p] - b[p] - top;
		if (below > -NEGLIGIBLE) sum += Math.exp(below);
	}
	return { best, logTotal: top + Math.log(sum) };
}
