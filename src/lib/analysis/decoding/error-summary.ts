import { mean } from '../statistics/mean';
import { quantileSorted } from '../statistics/quantile';

/** Distance errors in short; NaN when there are none. */
export interface ErrorSummary {
	readonly medianCm: number;
	readonly meanCm: number;
	readonly p95Cm: number;
	readonly fractionWithin10Cm: number;
}

/** Median, mean, 95th percentile (type 7) and the share of errors of at most 10 cm. */
export function errorSummary(errorCm: Float64Array): ErrorSummary {
	const sorted = errorCm.slice().sort();
	let within = 0;
	for (const error of sorted) if (error <= 10) within++;
	return {
		medianCm: quantileSorted(sorted, 0.5),
		meanCm: mean(sorted),
		p95Cm: quantileSorted(sorted, 0.95),
		fractionWithin10Cm: sorted.length === 0 ? NaN : within / sorted.length
	};
}
