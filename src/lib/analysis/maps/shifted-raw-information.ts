import { kernelShifts } from './kernel-shifts';
import type { KeptTime } from './kept-time';
import { shiftedFigures, type ShiftedFigures } from './shifted-figures';

/**
 * Information per spike of the unsmoothed map of a unit's spikes under every shift. With c spikes of
 * n in a bin and p its share of dwell, I = (Σ c·log₂ c − Σ c·log₂ p)/n − log₂ n; counts are whole
 * numbers, so c·log₂ c comes from a table. Bins without dwell are left out.
 * @param shifts     in cells, each in [0, kept.cells]
 * @param occupancyS seconds per bin
 * @param most       largest number of spikes of a unit
 * @returns NaN without a spike
 * Cost: O(shifts · (spikes + bins)).
 */
export function shiftedRawInformation(
	kept: Pick<KeptTime, 'binTwice'>,
	shifts: Int32Array,
	occupancyS: Float64Array,
	most: number
): ShiftedFigures {
	const bins = occupancyS.length;
	const seconds = occupancyS.reduce((sum, s) => sum + s, 0);
	const logShare = occupancyS.map((s) => (s > 0 ? Math.log2(s / seconds) : 0));
	const table = Float64Array.from({ length: most + 1 }, (_, c) => (c > 0 ? c * Math.log2(c) : 0));
	const laid = kernelShifts(kept, shifts, bins, most);
	const perSpike = (sum: number, spikes: number) => sum / spikes - Math.log2(spikes);
	if (!laid) {
		return (cells) =>
			shiftedFigures(kept, shifts, bins, (counts) => {
				let sum = 0;
				for (let k = 0; k < bins; k++) sum += table[counts[k]] - counts[k] * logShare[k];
				return perSpike(sum, cells.length);
			})(cells);
	}
	const { kernel, computed, counts } = laid;
	const logs = kernel.keep(logShare);
	const plogp = kernel.keep(table);
	const out = kernel.take(8 * computed);
	return (cells) => {
		const { at, count } = laid.spikes(cells);
		kernel.call.rawShifts(
			...[laid.binTwice, at, count, laid.shifts, computed, bins, logs, plogp, counts, out]
		);
		const sums = kernel.float64(out, shifts.length);
		return Float64Array.from(sums, (sum) => (count > 0 ? perSpike(sum, count) : NaN));
	};
}
