/**
 * Pearson correlation over the positions where both values are finite.
 * @returns NaN with fewer than three pairs, or when either side is constant
 * @throws RangeError lengths differ
 * Two passes, means first. Cost: O(n).
 */
export function pearson(a: ArrayLike<number>, b: ArrayLike<number>): number {
	if (a.length !== b.length) throw new RangeError(`lengths differ: ${a.length} and ${b.length}`);
	let pairs = 0;
	let sumA = 0;
	let sumB = 0;
	for (let i = 0; i < a.length; i++) {
		if (!Number.isFinite(a[i]) || !Number.isFinite(b[i])) continue;
		pairs++;
		sumA += a[i];
		sumB += b[i];
	}
	if (pairs < 3) return NaN;
	const meanA = sumA / pairs;
	const meanB = sumB / pairs;
	let ab = 0;
	let aa = 0;
	let bb = 0;
	for (let i = 0; i < a.length; i++) {
		if (!Number.isFinite(a[i]) || !Number.isFinite(b[i])) continue;
		const fromA = a[i] - meanA;
		const fromB = b[i] - meanB;
		ab += fromA * fromB;
		aa += fromA * fromA;
		bb += fromB * fromB;
	}
	if (!(aa > 0 && bb > 0)) return NaN;
	return Math.max(-1, Math.min(1, ab / Math.sqrt(aa * bb)));
}
