/**
 * What lies beyond the ends of a line of bins: nothing, its mirror image about the outer edge of the
 * last bin (… c b a | a b c …), or the other end.
 */
export type EdgeRule = 'zero' | 'reflect' | 'wrap';

/** Bin that stands at index k of an endless line, −1 for none. */
function beyond(k: number, count: number, edge: EdgeRule): number {
	if (k >= 0 && k < count) return k;
	if (edge === 'zero') return -1;
	const period = edge === 'wrap' ? count : 2 * count;
	const within = ((k % period) + period) % period;
	return within < count ? within : 2 * count - 1 - within;
}

/**
 * A smoother of lines of `count` bins that lie `stride` apart in a flat array. Line by line it
 * copies the bins into a padded buffer, so the inner loop has no edge to test for.
 * @param weights odd length, symmetric
 * @returns reads `from`, writes `to` (may be the same array) beginning at `offset`
 * Cost: O(count · weights) per line.
 */
export function lineSmoother(
	count: number,
	weights: Float64Array,
	edge: EdgeRule
): (from: Float64Array, to: Float64Array, offset: number, stride: number) => void {
	const reach = (weights.length - 1) / 2;
	const padded = new Float64Array(count + 2 * reach);
	const sources: { at: number; bin: number }[] = [];
	for (let at = 0; at < padded.length; at++) {
		const isPad = at < reach || at >= reach + count;
		const bin = isPad ? beyond(at - reach, count, edge) : -1;
		if (bin >= 0) sources.push({ at, bin });
	}
	return (from, to, offset, stride) => {
		for (let k = 0, at = offset; k < count; k++, at += stride) padded[reach + k] = from[at];
		for (const { at, bin } of sources) padded[at] = padded[reach + bin];
		for (let k = 0, at = offset; k < count; k++, at += stride) {
			const middle = k + reach;
			let sum = weights[reach] * padded[middle];
			for (let j = 1; j <= reach; j++) {
				sum += weights[reach + j] * (padded[middle - j] + padded[middle + j]);
			}
			to[at] = sum;
		}
	};
}
