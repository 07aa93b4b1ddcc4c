import type { Metric } from '../arena/metric';
import type { Windows } from './windows';

/**
 * Root-mean-square way between the middles of windows that follow each other without a hole, cm.
 * @param isIncluded windows whose step to the next counts
 * @returns NaN when no two windows touch
 */
export function rmsStepCm(
	windows: Windows,
	xCm: Float64Array,
	yCm: Float64Array,
	metric: Metric,
	isIncluded: (window: number) => boolean
): number {
	let squares = 0;
	let steps = 0;
	for (let w = 0; w + 1 < windows.startS.length; w++) {
		if (windowsBetween(windows, w, w + 1) !== 1 || !isIncluded(w) || !isIncluded(w + 1)) continue;
		const a = windows.sample[w];
		const b = windows.sample[w + 1];
		squares += metric(xCm[a], yCm[a], xCm[b], yCm[b]) ** 2;
		steps++;
	}
	return Math.sqrt(squares / steps);
}

/** How many window lengths lie between the beginnings of two windows. */
export function windowsBetween(windows: Windows, from: number, to: number): number {
	return Math.round((windows.startS[to] - windows.startS[from]) / windows.lengthS);
}
