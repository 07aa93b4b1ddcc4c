import { logTable } from '../kernel/log-table';
import { kernelShifts } from './kernel-shifts';
import type { KeptTime } from './kept-time';
import { shiftedFigures, type ShiftedFigures } from './shifted-figures';
import { smoothedInformation, weightsOfBins } from './smoothed-information';
import type { Smoother } from './smoother';

/**
 * Information per spike of the smoothed map of a unit's spikes under every shift: compiled where the
 * smoothing is separable, else `smoothedInformation` shift by shift; equal within 1e-12 bits.
 * @param shifts     in cells, each in [0, kept.cells]
 * @param occupancyS seconds per bin
 * @param most       largest number of spikes of a unit
 * Cost: O(shifts · (spikes + bins · weights)).
 */
export function shiftedSmoothedInformation(
	kept: KeptTime,
	shifts: Int32Array,
	occupancyS: Float64Array,
	smooth: Smoother,
	minOccupancyS: number,
	most: number
): ShiftedFigures {
	const bins = occupancyS.length;
	const { separable } = smooth;
	const laid = separable ? kernelShifts(kept, shifts, bins, most) : null;
	if (!separable || !laid) {
		const figure = smoothedInformation(occupancyS, smooth, minOccupancyS);
		return shiftedFigures(kept, shifts, bins, figure);
	}
	const { kernel, computed, counts } = laid;
	const { binsX, binsY, weights, isRing } = separable;
	const reach = (weights.length - 1) / 2;
	const reachY = binsY > 1 ? reach : 0;
	const half = kernel.keep(weights.slice(reach));
	const { perSecond, share } = weightsOfBins(occupancyS, smooth, minOccupancyS);
	const rates = kernel.keep(perSecond);
	const shares = kernel.keep(share);
	const logs = kernel.keep(logTable());
	const row = kernel.take(16 * (binsX + 2 * reach));
	const rows = kernel.take(16 * binsX * (binsY + 2 * reachY));
	const line = kernel.take(16 * binsX);
	const out = kernel.take(16 * computed);
	const wraps = isRing ? 1 : 0;
	return (cells) => {
		const spikes = laid.spikes(cells);
		kernel.call.smoothedShifts(
			...[laid.binTwice, spikes.at, spikes.count, laid.shifts, computed, binsX, binsY],
			...[half, reach, reachY, wraps, rates, shares, logs, counts, row, rows, line, out]
		);
		const sums = kernel.float64(out, 2 * shifts.length);
		return Float64Array.from(shifts, (_, s) => {
			const mean = sums[2 * s];
			return mean > 0 ? sums[2 * s + 1] / mean - Math.log2(mean) : NaN;
		});
	};
}
