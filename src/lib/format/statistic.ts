import { absent, formatNumber } from './number';

/** The smallest p a permutation test of 500 can give is 1/501; "0.000" would be a lie. */
export function formatP(p: number | null): string {
	if (p === null || Number.isNaN(p)) return absent;
	if (p < 0.001) return 'p < 0.001';
	return `p = ${formatNumber(p, p < 0.1 ? 3 : 2)}`;
}

/** Correlation, two decimals: "r 0.82". */
export function formatR(r: number | null): string {
	return r === null || Number.isNaN(r) ? absent : `r ${formatNumber(r, 2)}`;
}

interface Estimate {
	value: number | null;
	/** Lower and upper end; left out when there is no interval. */
	interval?: readonly [number, number] | null;
	unit?: string;
	/** Decimals of the value; the interval has one fewer, as it is known less well. */
	decimals?: number;
}

/** An estimate with its interval: "8.46 cm (7.9–9.1)". */
export function formatEstimate({ value, interval, unit = '', decimals = 2 }: Estimate): string {
	const text = formatNumber(value, decimals);
	if (text === absent) return absent;
	const withUnit = unit ? `${text} ${unit}` : text;
	if (!interval || interval.some(Number.isNaN)) return withUnit;
	const [low, high] = interval.map((end) => formatNumber(end, Math.max(0, decimals - 1)));
	// A dash between signed numbers reads as a minus.
	const between = low.startsWith('−') || high.startsWith('−') ? ' to ' : '–';
	return `${withUnit} (${low}${between}${high})`;
}
