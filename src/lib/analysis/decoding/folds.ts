import type { Windows } from './windows';

/** A contiguous run of windows that is decoded with maps from everything outside its span of time. */
export interface Fold {
	readonly from: number;
	/** One past the last window. */
	readonly to: number;
	readonly startS: number;
	readonly stopS: number;
}

/**
 * Cuts the windows into contiguous folds whose sizes differ by one at most, larger ones first.
 * Neighbouring windows are the same pass through the same place, so random folds would let the
 * test set leak into the maps.
 */
export function foldsOf(windows: Windows, wanted: number): Fold[] {
	const count = windows.startS.length;
	const folds: Fold[] = [];
	let from = 0;
	for (let f = 0; f < wanted; f++) {
		const to = from + Math.floor(count / wanted) + (f < count % wanted ? 1 : 0);
		if (to === from) break;
		const startS = windows.startS[from];
		folds.push({ from, to, startS, stopS: windows.startS[to - 1] + windows.lengthS });
		from = to;
	}
	return folds;
}
