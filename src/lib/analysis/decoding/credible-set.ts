/** Rounding allowed when a sum is compared with the level. */
const SLACK = 1e-12;

/**
 * Whether a place lies in the highest-probability set: the fewest places, most probable first (ties
 * by lower index), whose probabilities reach the level. A place is in it exactly when those ranked
 * before it do not reach the level yet, so nothing needs sorting.
 * @param probabilities sum 1
 * Cost: O(places).
 */
export function isInCredibleSet(
	probabilities: Float64Array,
	place: number,
	level: number
): boolean {
	const own = probabilities[place];
	let before = 0;
	for (let p = 0; p < probabilities.length; p++) {
		if (probabilities[p] > own || (probabilities[p] === own && p < place))
			before += probabilities[p];
	}
	return before < level - SLACK;
}
