/**
 * Smallest whole number k ≥ 0 for which `holds` is true.
 * @param holds false up to some k and true from there on
 * @throws RangeError not true up to 2⁵²
 * Doubling, then halving. Cost: O(log k) calls.
 */
export function smallestCount(holds: (k: number) => boolean): number {
	if (holds(0)) return 0;
	let low = 0;
	let high = 1;
	while (!holds(high)) {
		low = high;
		high *= 2;
		if (high > 2 ** 52) throw new RangeError('the condition holds for no count');
	}
	while (high - low > 1) {
		const middle = Math.floor((low + high) / 2);
		if (holds(middle)) high = middle;
		else low = middle;
	}
	return high;
}
