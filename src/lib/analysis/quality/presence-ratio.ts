/** Usual bin, s. */
export const PRESENCE_BIN_S = 60;
/** Bin for sessions on mazes, where a place cell is silent while the animal is elsewhere, s. */
export const MAZE_PRESENCE_BIN_S = 300;

/**
 * Share of time bins with at least one spike. Bins are half open and begin at `startS`; a last bin
 * that `stopS` cuts short is left out.
 * @param timesS in any order; spikes outside [startS, stopS) are ignored
 * @returns NaN when not one whole bin fits
 * @throws RangeError binS not above 0
 */
export function presenceRatio(
	timesS: Float64Array,
	startS: number,
	stopS: number,
	binS: number
): number {
	if (!(binS > 0)) throw new RangeError(`bin must be above 0 s, got ${binS}`);
	// A session of 1800 s must hold 30 bins of 60 s also when its ends carry rounding errors.
	const bins = Math.floor((stopS - startS) / binS + 1e-9);
	if (!(bins >= 1)) return NaN;
	const isHit = new Uint8Array(bins);
	for (const timeS of timesS) {
		const bin = Math.floor((timeS - startS) / binS);
		if (bin >= 0 && bin < bins) isHit[bin] = 1;
	}
	return isHit.reduce((sum, hit) => sum + hit, 0) / bins;
}
