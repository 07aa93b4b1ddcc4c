/** Rounds after which the messages have long settled for a bundle's worth of units. */
const ROUNDS = 50;

/**
 * What is left of each pair's prior when the other pairs are taken into account: an earlier unit goes on
 * as at most one unit of the day, and a unit of the day comes from at most one earlier unit. A pair whose
 * members have no better partner keeps its prior, one whose members do loses it.
 *
 * Marginals of the one-to-one pairing by belief propagation (Williams and Lau 2014, IEEE Transactions
 * on Aerospace and Electronic Systems 50:2942).
 * @param ratios likelihood ratio of each pair, row-major [earlier][today], 0 where it is no candidate
 * @param priors plain prior of each pair: presence over number of candidates
 * @param presences chance of each earlier unit to be seen today, under 1
 * @returns for each pair the prior that gives its marginal probability as p/(1 − p) = ratio · π/(1 − π);
 * 0 for a pair that is no candidate
 * Cost: O(rounds · pairs).
 */
export function rivalPriors(
	ratios: Float64Array,
	priors: Float64Array,
	presences: Float64Array
): Float64Array {
	const rows = presences.length;
	const columns = rows === 0 ? 0 : ratios.length / rows;
	const weights = priors.map((prior, at) => prior / (1 - presences[Math.floor(at / columns)]));
	const free = new Float64Array(ratios.length).fill(1);
	const claims = new Float64Array(ratios.length);
	const without = new Float64Array(ratios.length);
	for (let round = 0; round < ROUNDS; round++) {
		for (let r = 0; r < rows; r++) {
			for (let c = 0; c < columns; c++) {
				let others = 1;
				for (let k = 0; k < columns; k++) {
					const at = r * columns + k;
					if (k !== c) others += weights[at] * ratios[at] * free[at];
				}
				const at = r * columns + c;
				without[at] = others;
				claims[at] = (weights[at] * ratios[at]) / others;
			}
		}
		for (let c = 0; c < columns; c++) {
			for (let r = 0; r < rows; r++) {
				let others = 1;
				for (let k = 0; k < rows; k++) if (k !== r) others += claims[k * columns + c];
				free[r * columns + c] = 1 / others;
			}
		}
	}
	return weights.map((weight, at) => {
		const odds = (weight * free[at]) / without[at];
		return odds / (1 + odds);
	});
}
