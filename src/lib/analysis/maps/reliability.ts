import { pearson } from '../statistics/pearson';

/** How well a map repeats itself within a session. */
export interface Reliability {
	/** Correlation of the two half maps over bins defined in both. */
	readonly halfR: number;
	/** What two maps of the whole session would have: the ceiling for any other session. */
	readonly fullR: number;
}

/**
 * Correlation of the maps of two halves of a session (odd and even laps, or first and second half),
 * and its step up to full length.
 * @param oneHz Hz per bin, NaN undefined
 * @throws RangeError lengths differ
 * @returns NaN with fewer than three common bins, or a constant map
 */
export function reliability(oneHz: Float64Array, otherHz: Float64Array): Reliability {
	const halfR = pearson(oneHz, otherHz);
	return { halfR, fullR: spearmanBrown(halfR) };
}

/**
 * Reliability of a whole from the correlation of its two halves: 2r/(1 + r) (Spearman 1910, Brown
 * 1910). Below r = −1/3 this leaves the range of a correlation, and −1 is returned.
 * @param halfR −1 to 1; NaN stays NaN
 * @throws RangeError halfR outside −1 to 1
 */
export function spearmanBrown(halfR: number): number {
	if (Math.abs(halfR) > 1) throw new RangeError(`a correlation of ${halfR} is outside −1 to 1`);
	return halfR <= -1 / 3 ? -1 : (2 * halfR) / (1 + halfR);
}
