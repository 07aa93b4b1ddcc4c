import type { Random } from '../random/seeded';
import { quantile } from '../statistics/quantile';
import { weightedMedian } from '../statistics/weighted-median';

/** With fewer groups than this an interval would say nothing. */
export const LEAST_GROUPS = 5;

/**
 * Draws of groups (laps or blocks of time) with replacement. Windows are never drawn one by one:
 * neighbours are the same pass and would make the interval too narrow (Künsch 1989).
 * @returns for every draw how often each group was taken, `groups` numbers per draw
 */
export function drawGroups(groups: number, draws: number, random: Random): Int32Array[] {
	return Array.from({ length: draws }, () => {
		const copies = new Int32Array(groups);
		for (let g = 0; g < groups; g++) copies[random.below(groups)]++;
		return copies;
	});
}

/** Median of the values of each draw, in the order of the draws. */
export function drawnMedians(
	values: Float64Array,
	group: Int32Array,
	draws: readonly Int32Array[]
): Float64Array {
	const order = Int32Array.from(values.keys()).sort((a, b) => values[a] - values[b]);
	const sorted = Float64Array.from(order, (i) => values[i]);
	const sortedGroup = Int32Array.from(order, (i) => group[i]);
	return Float64Array.from(draws, (copies) => weightedMedian(sorted, sortedGroup, copies));
}

/**
 * Mean of the values of each draw; NaN values count for nothing.
 * @param groups number of groups
 */
export function drawnMeans(
	values: Float64Array,
	group: Int32Array,
	groups: number,
	draws: readonly Int32Array[]
): Float64Array {
	const sums = new Float64Array(groups);
	const counts = new Float64Array(groups);
	for (let i = 0; i < values.length; i++) {
		if (Number.isNaN(values[i])) continue;
		sums[group[i]] += values[i];
		counts[group[i]]++;
	}
	return Float64Array.from(draws, (copies) => {
		let sum = 0;
		let count = 0;
		for (let g = 0; g < groups; g++) {
			sum += copies[g] * sums[g];
			count += copies[g] * counts[g];
		}
		return count > 0 ? sum / count : NaN;
	});
}

/** Percentile interval that holds `share` of the drawn figures in its middle. */
export function percentileInterval(drawn: Float64Array, share: number): [number, number] {
	return [quantile(drawn, (1 - share) / 2), quantile(drawn, (1 + share) / 2)];
}
