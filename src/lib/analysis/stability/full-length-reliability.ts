/**
 * Reliability of a whole session from the correlation of its halves, 2r/(1 + r) (Spearman 1910, Brown
 * 1910). It is the ceiling for correlations across days.
 * @param halfR correlation of maps of two halves, or of odd and even laps
 * @returns NaN at −1
 */
export function fullLengthReliability(halfR: number): number {
	return halfR > -1 ? (2 * halfR) / (1 + halfR) : NaN;
}
