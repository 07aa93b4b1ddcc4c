import { pearson } from '../statistics/pearson';

/** Fewer shared bins than this say nothing of a map. */
export const LEAST_BINS = 10;

/** How alike two maps of one unit are. */
export interface MapCorrelation {
	/** NaN with under ten shared bins, or where either map is flat over them. */
	readonly r: number;
	/** Bins that are defined in both. */
	readonly bins: number;
}

/**
 * Pearson correlation of two maps over the bins defined in both. Both must be made with the same
 * arena, bins and smoothing.
 * @param aHz, bHz Hz per bin, NaN undefined
 * @throws RangeError lengths differ
 */
export function mapCorrelation(aHz: Float64Array, bHz: Float64Array): MapCorrelation {
	const r = pearson(aHz, bHz);
	let bins = 0;
	for (let k = 0; k < aHz.length; k++) if (!Number.isNaN(aHz[k] + bHz[k])) bins++;
	return { r: bins >= LEAST_BINS ? r : NaN, bins };
}
