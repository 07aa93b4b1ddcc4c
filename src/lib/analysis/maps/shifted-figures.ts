import type { KeptTime } from './kept-time';

/** Figures of a unit's spikes, one for every shift. @param cells cell of each spike */
export type ShiftedFigures = (cells: Int32Array) => Float64Array;

/**
 * Any figure of the counts per bin of shifted spikes.
 * @param shifts in cells, each in [0, kept.cells]
 * @param bins   number of bins
 * @param figure of counts per bin (the array is reused, do not keep it)
 * Cost: O(shifts · (spikes + figure)).
 */
export function shiftedFigures(
	kept: Pick<KeptTime, 'binTwice'>,
	shifts: Int32Array,
	bins: number,
	figure: (counts: Float64Array) => number
): ShiftedFigures {
	const { binTwice } = kept;
	// Two tallies in turn: spikes of a burst fall into one bin, and a counter that was just written
	// is slow to read back.
	const even = new Int32Array(bins);
	const odd = new Int32Array(bins);
	const counts = new Float64Array(bins);
	return (cells) => {
		const pairs = cells.length & ~1;
		return Float64Array.from(shifts, (shift) => {
			even.fill(0);
			odd.fill(0);
			for (let k = 0; k < pairs; k += 2) {
				even[binTwice[cells[k] + shift]]++;
				odd[binTwice[cells[k + 1] + shift]]++;
			}
			if (pairs < cells.length) even[binTwice[cells[pairs] + shift]]++;
			for (let k = 0; k < bins; k++) counts[k] = even[k] + odd[k];
			return figure(counts);
		});
	};
}
