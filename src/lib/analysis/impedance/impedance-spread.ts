import { median } from '../statistics/quantile';
import { robustSd } from '../statistics/robust-sd';

/** How the readings of a test lie to each other, on a logarithmic scale. */
export interface ImpedanceSpread {
	readonly medianKohm: number;
	/** (log₁₀ Z − median) / (median absolute deviation / 0.6745) of each reading. */
	readonly robustZ: Float64Array;
}

/**
 * Median and robust z of impedances, both of log₁₀.
 * @param kohm NaN, 0 and below are unknown: left out, and NaN in robustZ
 * @returns robustZ is NaN throughout when more than half the readings are equal
 */
export function impedanceSpread(kohm: ArrayLike<number>): ImpedanceSpread {
	const logs = Float64Array.from(kohm, (reading) => (reading > 0 ? Math.log10(reading) : NaN));
	const middle = median(logs);
	const sd = robustSd(logs);
	return {
		medianKohm: 10 ** middle,
		robustZ: logs.map((log) => (sd > 0 ? (log - middle) / sd : NaN))
	};
}
