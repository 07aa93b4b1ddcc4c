/** A correlation is pulled back this far from ±1, where the transform has no value. */
const FURTHEST = 0.999999;

/** Fisher's z = atanh r of a correlation, r cut at ±0.999999; NaN stays NaN. */
export function fisherZ(r: number): number {
	return Math.atanh(Math.max(-FURTHEST, Math.min(FURTHEST, r)));
}
