import type { WindowCounts } from './window-counts';

/**
 * Share of windows in which no decoding unit fired. They are decoded like all others (silence is
 * evidence), but where the share is large the answers come from silence and the prior.
 * @returns NaN without windows
 */
export function silentShare({ first }: WindowCounts): number {
	const windows = first.length - 1;
	let silent = 0;
	for (let w = 0; w < windows; w++) if (first[w] === first[w + 1]) silent++;
	return windows > 0 ? silent / windows : NaN;
}
