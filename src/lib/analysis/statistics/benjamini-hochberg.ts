/**
 * p-values adjusted for the false-discovery rate (Benjamini and Hochberg 1995): the smallest rate at
 * which each test is among the discoveries, min over k ≥ rank of n·p₍k₎/k, at most 1.
 * NaN stays NaN and is not counted among the tests.
 * @param p in [0, 1], any order
 * @returns same order as p; a test is a discovery at rate q when its adjusted value is ≤ q
 * @throws RangeError a value outside 0 to 1
 * Cost: O(n log n).
 */
export function benjaminiHochberg(p: ArrayLike<number>): Float64Array {
	const adjusted = new Float64Array(p.length).fill(NaN);
	const order: number[] = [];
	for (let i = 0; i < p.length; i++) {
		if (p[i] < 0 || p[i] > 1) throw new RangeError(`p-value ${p[i]} is outside 0 to 1`);
		if (!Number.isNaN(p[i])) order.push(i);
	}
	order.sort((a, b) => p[a] - p[b]);
	let smallest = 1;
	for (let rank = order.length; rank >= 1; rank--) {
		const i = order[rank - 1];
		smallest = Math.min(smallest, (p[i] * order.length) / rank);
		adjusted[i] = smallest;
	}
	return adjusted;
}
