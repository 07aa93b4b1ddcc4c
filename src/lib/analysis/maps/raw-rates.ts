/** Unsmoothed rates: counts over dwell, Hz; NaN where the dwell is under `minOccupancyS`. */
export function rawRates(
	counts: Float64Array,
	occupancyS: Float64Array,
	minOccupancyS: number
): Float64Array {
	return counts.map((count, k) => (occupancyS[k] >= minOccupancyS ? count / occupancyS[k] : NaN));
}
