import type { Random } from '../random/seeded';
import type { KeptTime } from './kept-time';

/** Shifts keep this far from no shift at all, s. */
const LEAST_SHIFT_S = 20;
/** With less kept time than this no test is made, s. */
export const LEAST_TEST_S = 60;

/**
 * Random shifts for the test, in cells of the kept time: uniform in [20 s, T − 20 s].
 * One list serves all units, so the order of the units cannot change a result.
 * @returns empty when there is under 60 s of kept time
 */
export function drawShifts(kept: KeptTime, count: number, random: Random): Int32Array {
	if (!(kept.lengthS >= LEAST_TEST_S)) return new Int32Array(0);
	const least = Math.ceil(LEAST_SHIFT_S / kept.cellS);
	const most = kept.cells - least;
	return Int32Array.from({ length: count }, () => least + random.below(most - least + 1));
}

/** What the shifted spikes of one unit gave. */
export interface ShiftTest {
	/** Figure of each shift; NaN where it was undefined. */
	readonly nullValues: Float64Array;
	/** (b + 1)/(m + 1), b = shifts whose figure is at least the observed one; never 0. */
	readonly p: number;
	readonly nullMean: number;
}

/** Figures that differ by rounding alone count as equal. */
const ROUNDING = 1e-12;

/**
 * Circular-shift test: all spikes of a unit are moved along the kept time by one amount, wrapping at
 * its end. That keeps bursts and breaks the link to place. p follows Phipson and Smyth 2010.
 * @param cells  cell of each spike
 * @param shifts in cells, each in [0, kept.cells]
 * @param figure of counts per bin (the array is reused, do not keep it)
 * @param bins   number of bins
 * @returns p is NaN when the observed figure is NaN or there are no shifts
 * Cost: O(shifts · (spikes + figure)).
 */
export function shiftTest(
	kept: KeptTime,
	cells: Int32Array,
	shifts: Int32Array,
	bins: number,
	observed: number,
	figure: (counts: Float64Array) => number
): ShiftTest {
	const nullValues = new Float64Array(shifts.length);
	// Two tallies in turn: spikes of a burst fall into one bin, and a counter that was just written
	// is slow to read back.
	const even = new Int32Array(bins);
	const odd = new Int32Array(bins);
	const pairs = cells.length & ~1;
	const counts = new Float64Array(bins);
	const { binTwice } = kept;
	let atLeast = 0;
	let sum = 0;
	for (let m = 0; m < shifts.length; m++) {
		const shift = shifts[m];
		even.fill(0);
		odd.fill(0);
		for (let k = 0; k < pairs; k += 2) {
			even[binTwice[cells[k] + shift]]++;
			odd[binTwice[cells[k + 1] + shift]]++;
		}
		if (pairs < cells.length) even[binTwice[cells[pairs] + shift]]++;
		for (let k = 0; k < bins; k++) counts[k] = even[k] + odd[k];
		nullValues[m] = figure(counts);
		if (nullValues[m] >= observed - ROUNDING) atLeast++;
		sum += nullValues[m];
	}
	const isTested = shifts.length > 0 && Number.isFinite(observed);
	return {
		nullValues,
		p: isTested ? (atLeast + 1) / (shifts.length + 1) : NaN,
		nullMean: sum / shifts.length
	};
}
