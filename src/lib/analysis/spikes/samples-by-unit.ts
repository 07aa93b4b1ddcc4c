import type { TimedSpikes } from './timed-spikes';

/**
 * The position sample of each spike of some units: the last one at or before it. Spikes before the
 * first sample are left out.
 * @param tS ascending
 * @returns one list per unit from … to − 1, in order of time
 * Cost: one merge pass, O(spikes + samples).
 */
export function samplesByUnit(
	{ timeS, unit, units }: TimedSpikes,
	tS: Float64Array,
	from: number,
	to: number
): Int32Array[] {
	const next = new Int32Array(units + 1);
	for (let k = 0; k < unit.length; k++) next[unit[k] + 1]++;
	for (let u = 0; u < units; u++) next[u + 1] += next[u];
	const first = next.slice();
	const base = first[from];
	const samples = new Int32Array(first[to] - base);
	let i = -1;
	let nextS = tS.length > 0 ? tS[0] : Infinity;
	for (let k = 0; k < timeS.length; k++) {
		while (nextS <= timeS[k]) {
			i++;
			nextS = i + 1 < tS.length ? tS[i + 1] : Infinity;
		}
		const u = unit[k];
		if (u >= from && u < to && i >= 0) samples[next[u]++ - base] = i;
	}
	return Array.from({ length: to - from }, (_, u) =>
		samples.subarray(first[from + u] - base, next[from + u] - base)
	);
}
