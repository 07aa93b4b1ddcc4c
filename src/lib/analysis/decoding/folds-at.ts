import type { Fold } from './folds';
import type { Windows } from './windows';

/**
 * Folds that begin at the given windows; each reaches to the next.
 * @param begins ascending, the first 0; none for no folds
 */
export function foldsAt(windows: Windows, begins: readonly number[]): Fold[] {
	return begins.map((from, f) => {
		const to = f + 1 < begins.length ? begins[f + 1] : windows.startS.length;
		return {
			from,
			to,
			startS: windows.startS[from],
			stopS: windows.startS[to - 1] + windows.lengthS
		};
	});
}
