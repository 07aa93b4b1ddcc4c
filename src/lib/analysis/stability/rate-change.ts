/** How a rate moved between two days. */
export interface RateChange {
	/** |a − b|/(a + b), 0 none, 1 all. */
	readonly change: number;
	/** min/max, 1 none, 0 all. */
	readonly overlap: number;
}

/**
 * Rate change and rate overlap of a unit; both NaN when it is silent on both days.
 * @throws RangeError a rate below 0
 */
export function rateChange(aHz: number, bHz: number): RateChange {
	if (aHz < 0 || bHz < 0) throw new RangeError('rates must not be below 0');
	return {
		change: Math.abs(aHz - bHz) / (aHz + bHz),
		overlap: Math.min(aHz, bHz) / Math.max(aHz, bHz)
	};
}
