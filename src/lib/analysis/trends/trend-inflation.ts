import { normalQuantile } from '../statistics/normal';
import { theilSen } from './theil-sen';

/**
 * How much wider Kendall's S spreads because neighbouring days resemble each other (Hamed and Rao
 * 1998): 1 + 2/(n(n − 1)(n − 2)) Σ (n − k)(n − k − 1)(n − k − 2) ρ(k), with ρ the autocorrelation of
 * the ranks after the Theil–Sen line is taken out, over lags where |ρ| > 1.96/√n.
 * We never let it fall below 1, so it cannot make the test more eager.
 * @param y in order of time, evenly spaced; NaN values are left out, which shortens lags over gaps
 * @returns factor for `mannKendall`, ≥ 1; 1 with fewer than four values or a constant series
 * Cost: O(n² log n).
 */
export function trendInflation(y: ArrayLike<number>): number {
	const v = Float64Array.from(Array.from(y).filter(Number.isFinite));
	const n = v.length;
	if (n < 4) return 1;
	const { slope } = theilSen(Array.from(v.keys()), v);
	const ranks = midRanks(v.map((value, i) => value - slope * i));
	const middle = (n + 1) / 2;
	const lagged = (k: number) => {
		let sum = 0;
		for (let i = 0; i + k < n; i++) sum += (ranks[i] - middle) * (ranks[i + k] - middle);
		return sum;
	};
	const variance = lagged(0);
	if (variance === 0) return 1;
	const noticed = normalQuantile(0.975) / Math.sqrt(n);
	let sum = 0;
	for (let k = 1; k < n - 2; k++) {
		const rho = lagged(k) / variance;
		if (Math.abs(rho) > noticed) sum += (n - k) * (n - k - 1) * (n - k - 2) * rho;
	}
	return Math.max(1, 1 + (2 * sum) / (n * (n - 1) * (n - 2)));
}

/** Ranks 1 … n, equal values sharing the mean of theirs. */
function midRanks(values: Float64Array): Float64Array {
	return values.map((value) => {
		let below = 0;
		let same = 0;
		for (const other of values) {
			if (other < value) below++;
			else if (other === value) same++;
		}
		return below + (same + 1) / 2;
	});
}
