import { median } from '../statistics/quantile';

/** Upper quartile of the standard normal law: what the median absolute deviation is of its σ. */
const MAD_OF_SIGMA = 0.6744897501960817;

/**
 * Standard deviation of noise from its median absolute deviation, which spikes that were missed
 * hardly move: median|v − median v| / 0.6745.
 * @param valuesUv signal without the units' spikes, µV; NaN values are left out
 * @returns µV; NaN when empty
 */
export function noiseSd(valuesUv: Float64Array): number {
	const middle = median(valuesUv);
	return median(valuesUv.map((value) => Math.abs(value - middle))) / MAD_OF_SIGMA;
}
