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
	return reachesPlace(massBefore(probabilities, place), level);
}

/** Sum of the probabilities that are ranked before a place; the smallest level that leaves it out. */
export function massBefore(probabilities: Float64Array, place: number): number {
	const own = probabilities[place];
	let before = 0;
	for (let p = 0; p < probabilities.length; p++) {
		if (probabilities[p] > own || (probabilities[p] === own && p < place))
			before += probabilities[p];
	}
	return before;
}

/** Whether the set of a level goes on past what is ranked before a place. */
export function reachesPlace(before: number, level: number): boolean {
	return before < level - SLACK;
}

/**
 * Number of places in the highest-probability set.
 * @param ascending the probabilities, sorted
 */
export function credibleSetSize(ascending: Float64Array, level: number): number {
	let sum = 0;
	let size = 0;
	while (size < ascending.length && reachesPlace(sum, level)) {
		size++;
		sum += ascending[ascending.length - size];
	}
	return size;
}
