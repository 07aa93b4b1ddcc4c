import type { WindowCounts } from './window-counts';

/** Number of spikes of every unit in one window, zeros included. */
export function spikesOfWindow(counts: WindowCounts, window: number, units: number): Float64Array {
	const out = new Float64Array(units);
	for (let e = counts.first[window]; e < counts.first[window + 1]; e++) {
		out[counts.unit[e]] = counts.spikes[e];
	}
	return out;
}
