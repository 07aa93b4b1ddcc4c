import type { Smoother } from './smoother';

/**
 * Rate map by normalised convolution (Knutsson and Westin 1993): the smoothed raw rates of visited
 * bins over the smoothed share of visited bins, (w∗(r·V))/(w∗V). Every visited bin weighs alike,
 * however long the stay; `rateMapper` lets long stays weigh more. Holes are left out of both sums.
 * @param counts        spikes per bin
 * @param occupancyS    seconds per bin, same length
 * @param minOccupancyS bins with less dwell of their own are NaN, never 0; must be above 0
 * @returns Hz per bin, new array
 * @throws RangeError lengths differ, or minOccupancyS not above 0
 * Cost: two smoothings.
 */
export function convolvedRates(
	counts: Float64Array,
	occupancyS: Float64Array,
	smooth: Smoother,
	minOccupancyS: number
): Float64Array {
	if (counts.length !== occupancyS.length) {
		throw new RangeError(`lengths differ: ${counts.length} and ${occupancyS.length}`);
	}
	if (!(minOccupancyS > 0)) {
		throw new RangeError(`least dwell must be above 0, got ${minOccupancyS}`);
	}
	const visited = occupancyS.map((seconds) => (seconds > 0 ? 1 : 0));
	const raw = counts.map((count, k) => (visited[k] ? count / occupancyS[k] : 0));
	smooth(visited, visited);
	smooth(raw, raw);
	return raw.map((rate, k) => (occupancyS[k] >= minOccupancyS ? rate / visited[k] : NaN));
}
