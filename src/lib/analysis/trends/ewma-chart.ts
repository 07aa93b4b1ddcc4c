/** A chart of exponentially weighted means. */
export interface EwmaChart {
	/** z after each value; the target before the first. */
	readonly z: Float64Array;
	readonly upper: Float64Array;
	readonly lower: Float64Array;
	/** Positions where z lies outside its limits. */
	readonly signals: readonly number[];
}

export interface EwmaSettings {
	readonly target: number;
	/** Standard deviation of one value, > 0. */
	readonly sd: number;
	/** Weight of the newest value, in (0, 1]. */
	readonly lambda: number;
	/** Limits in standard deviations of z, > 0. */
	readonly width: number;
	/** `fixed`: the limits of a long series from the start; `growing`: those of the values so far. */
	readonly limits: 'fixed' | 'growing';
}

/**
 * EWMA control chart: z = λy + (1 − λ)z, from the target; limits target ± L · sd · √(λ/(2 − λ)),
 * while growing times √(1 − (1 − λ)^{2t}).
 * A NaN value leaves z where it is, gives no signal and does not count towards t.
 * @throws RangeError a setting out of range
 * Source: NIST/SEMATECH e-Handbook 6.3.2.4. Cost: O(n).
 */
export function ewmaChart(y: ArrayLike<number>, settings: EwmaSettings): EwmaChart {
	const { target, sd, lambda, width, limits } = settings;
	if (!(lambda > 0 && lambda <= 1)) throw new RangeError(`lambda ${lambda} is outside 0 to 1`);
	if (!(sd > 0 && width > 0)) throw new RangeError(`sd and width must be above 0: ${sd}, ${width}`);
	const z = new Float64Array(y.length);
	const upper = new Float64Array(y.length);
	const lower = new Float64Array(y.length);
	const signals: number[] = [];
	const settled = width * sd * Math.sqrt(lambda / (2 - lambda));
	let now = target;
	let seen = 0;
	for (let i = 0; i < y.length; i++) {
		const isSeen = Number.isFinite(y[i]);
		if (isSeen) {
			now = lambda * y[i] + (1 - lambda) * now;
			seen++;
		}
		const reach =
			limits === 'fixed' ? settled : settled * Math.sqrt(1 - (1 - lambda) ** (2 * seen));
		z[i] = now;
		upper[i] = target + reach;
		lower[i] = target - reach;
		if (isSeen && Math.abs(now - target) > reach) signals.push(i);
	}
	return { z, upper, lower, signals };
}
