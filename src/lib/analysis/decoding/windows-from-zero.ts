import { firstFrom } from '../spikes/timed-spikes';

/** Windows side by side from time 0, in contiguous folds; a moment t lies in window ⌊t / windowS⌋. */
export interface WindowsFromZero {
	readonly windows: number;
	readonly windowS: number;
	readonly folds: number;
}

/** First window of a fold; folds are as even as can be. */
export function foldStart({ windows, folds }: WindowsFromZero, fold: number): number {
	return Math.ceil((fold * windows) / folds);
}

/**
 * Index of the first moment that belongs to a fold. What lies before the first window belongs to
 * the first fold, what lies after the last window to the last.
 * @param timeS ascending
 */
export function firstOfFold(plan: WindowsFromZero, timeS: Float64Array, fold: number): number {
	if (fold <= 0) return 0;
	if (fold >= plan.folds) return timeS.length;
	const start = foldStart(plan, fold);
	// The product and the quotient may round apart, so the division decides.
	const windowOf = (k: number) => Math.floor(timeS[k] / plan.windowS);
	let k = firstFrom(timeS, start * plan.windowS);
	while (k > 0 && windowOf(k - 1) >= start) k--;
	while (k < timeS.length && windowOf(k) < start) k++;
	return k;
}
