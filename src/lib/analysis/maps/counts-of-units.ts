import { firstFrom, type TimedSpikes } from '../spikes/timed-spikes';

/** Room for one bin in counts of [bin][unit]: the units, filled up to whole fours. */
export function unitRoom(units: number): number {
	return Math.ceil(units / 4) * 4;
}

/**
 * Adds the spikes from … to − 1 to counts of [bin][unit], the layout the compiled kernel smooths: an
 * animal stays in a bin for many spikes, so neighbouring spikes meet in fast memory. A spike belongs
 * to the last sample at or before it; spikes before the first sample do not count.
 * @param tS        ascending
 * @param binOffset bin of each sample times the room of one bin
 * Cost: one merge pass, O(spikes + samples passed over).
 */
export function addCounts(
	counts: Int32Array,
	tS: Float64Array,
	binOffset: Int32Array,
	{ timeS, unit }: TimedSpikes,
	from: number,
	to: number
): void {
	if (to <= from) return;
	let next = firstFrom(tS, timeS[from]);
	let nextS = next < tS.length ? tS[next] : Infinity;
	for (let k = from; k < to; k++) {
		while (nextS <= timeS[k]) nextS = ++next < tS.length ? tS[next] : Infinity;
		if (next > 0) counts[binOffset[next - 1] + unit[k]]++;
	}
}
