import { pearson } from '../statistics/pearson';

/**
 * Spatial coherence: correlation over bins between the unsmoothed rate and the mean rate of the
 * defined neighbours (Muller and Kubie 1989; they print its Fisher transform, this is r itself).
 * NaN bins, and bins without a defined neighbour, are left out.
 * @param ratesHz    unsmoothed Hz per bin
 * @param neighbours touching bins, diagonals included
 * @returns NaN with fewer than three bins or a constant map
 */
export function coherence(ratesHz: Float64Array, neighbours: readonly Int32Array[]): number {
	const around = ratesHz.map((_, k) => {
		let sum = 0;
		let defined = 0;
		for (const j of neighbours[k]) {
			if (!Number.isFinite(ratesHz[j])) continue;
			sum += ratesHz[j];
			defined++;
		}
		return defined > 0 ? sum / defined : NaN;
	});
	return pearson(ratesHz, around);
}
