import type { Windows } from './windows';

/**
 * Spikes per window, stored sparsely: window w holds the entries first[w] … first[w + 1] − 1, each a
 * unit and its number of spikes (never 0), units ascending.
 */
export interface WindowCounts {
	readonly first: Int32Array;
	readonly unit: Int32Array;
	readonly spikes: Float64Array;
}

/**
 * Counts the spikes of every unit in every window, [start, start + length). All spikes count, also
 * those at samples that do not.
 * @param spikeS spike times of each unit, ascending
 * Cost: two passes of O(spikes + units · windows).
 */
export function windowCounts(windows: Windows, spikeS: readonly Float64Array[]): WindowCounts {
	const { startS, lengthS } = windows;
	const first = new Int32Array(startS.length + 1);
	eachCount(startS, lengthS, spikeS, (window) => first[window + 1]++);
	for (let w = 0; w < startS.length; w++) first[w + 1] += first[w];
	const next = first.slice();
	const unit = new Int32Array(first[startS.length]);
	const spikes = new Float64Array(unit.length);
	eachCount(startS, lengthS, spikeS, (window, u, count) => {
		unit[next[window]] = u;
		spikes[next[window]++] = count;
	});
	return { first, unit, spikes };
}

function eachCount(
	startS: Float64Array,
	lengthS: number,
	spikeS: readonly Float64Array[],
	found: (window: number, unit: number, count: number) => void
): void {
	for (let u = 0; u < spikeS.length; u++) {
		const times = spikeS[u];
		let from = 0;
		for (let w = 0; w < startS.length; w++) {
			while (from < times.length && times[from] < startS[w]) from++;
			const endS = startS[w] + lengthS;
			let to = from;
			while (to < times.length && times[to] < endS) to++;
			if (to > from) found(w, u, to - from);
			if (from === times.length) break;
		}
	}
}
