/** Two sortings of the same data place a spike within this of each other, s. */
export const COINCIDENCE_S = 0.0005;

/**
 * Number of spikes of two trains that fall together, each used once. Walking both in order finds the
 * largest possible number.
 * @param aS, bS    ascending, s
 * @param withinS   at most this far apart
 * @throws RangeError withinS below 0
 * Cost: O(a + b).
 */
export function coincidentSpikes(aS: Float64Array, bS: Float64Array, withinS: number): number {
	if (!(withinS >= 0)) throw new RangeError(`tolerance must be 0 s or more, got ${withinS}`);
	let count = 0;
	let a = 0;
	let b = 0;
	while (a < aS.length && b < bS.length) {
		const apart = aS[a] - bS[b];
		if (Math.abs(apart) <= withinS) {
			count++;
			a++;
			b++;
		} else if (apart < 0) a++;
		else b++;
	}
	return count;
}
