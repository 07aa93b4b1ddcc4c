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
export function drawShifts(
	kept: Pick<KeptTime, 'lengthS' | 'cellS' | 'cells'>,
	count: number,
	random: Random
): Int32Array {
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
 * @param observed   figure of the unit as recorded
 * @param nullValues the same of its shifted spikes
 * @returns p is NaN when the observed figure is NaN or there are no shifts
 */
export function shiftTest(observed: number, nullValues: Float64Array): ShiftTest {
	let atLeast = 0;
	let sum = 0;
	for (const value of nullValues) {
		if (value >= observed - ROUNDING) atLeast++;
		sum += value;
	}
	const isTested = nullValues.length > 0 && Number.isFinite(observed);
	return {
		nullValues,
		p: isTested ? (atLeast + 1) / (nullValues.length + 1) : NaN,
		nullMean: sum / nullValues.length
	};
}
