import type { TimedSpikes } from '../spikes/timed-spikes';

/**
 * Spikes of a run of windows, one entry for every unit that fired in a window, in the order they
 * first fired.
 * @param from, to  spikes of the run
 * @param firstWindow the run's first; window w is [w · windowS, (w + 1) · windowS)
 * @param first     one more than windows: where each begins
 * @param unit, spikes  gets entries, every second number (they share one memory)
 * Cost: O(spikes + windows).
 */
export function windowEntries(
	{ timeS, unit: unitOf, units }: TimedSpikes,
	from: number,
	to: number,
	firstWindow: number,
	windowS: number,
	first: Int32Array,
	unit: Int32Array,
	spikes: Float32Array
): void {
	const entryOf = new Int32Array(units).fill(-1);
	let next = 0;
	let begin = 0;
	let window = 0;
	for (let k = from; k < to; k++) {
		const at = Math.floor(timeS[k] / windowS) - firstWindow;
		if (at !== window) {
			if (at + 1 >= first.length) break;
			while (window < at) first[++window] = next;
			begin = next;
		}
		const u = unitOf[k];
		if (entryOf[u] >= begin) {
			spikes[2 * entryOf[u] + 1]++;
			continue;
		}
		entryOf[u] = next;
		unit[2 * next] = u;
		spikes[2 * next + 1] = 1;
		next++;
	}
	while (window + 1 < first.length) first[++window] = next;
}
