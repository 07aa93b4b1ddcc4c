import { median } from './quantile';

/** Upper quartile of the standard normal law: what the median absolute deviation is of its σ. */
const MAD_OF_SIGMA = 0.6744897501960817;

/**
 * Standard deviation of normal values from their median absolute deviation, which outliers hardly
 * move: median|v − median v| / 0.6745.
 * @param values NaN values are left out
 * @returns NaN when empty; 0 when more than half are equal
 */
export function robustSd(values: Float64Array): number {
	const middle = median(values);
	return median(values.map((value) => Math.abs(value - middle))) / MAD_OF_SIGMA;
}
