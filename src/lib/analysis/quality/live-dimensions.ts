import type { Moments } from './covariance';

/** A dimension with less than this share of its variance to itself follows from the others. */
export const LEAST_OWN_SHARE = 1e-10;
/** A spread below this share of the mean is rounding. */
const ROUNDING = 1e-12;

/**
 * Dimensions of a feature space that say something of their own: those that vary, and that no
 * earlier ones give by a linear rule. A broken wire leaves a constant, two wires that touch leave
 * one dimension twice. Judged over every spike of the bundle, since a wire is dead for all of them.
 * @returns ascending; all dimensions when nothing is dead
 * Cholesky factor of the correlation matrix, row by row, leaving out the rows that add nothing.
 */
export function liveDimensions({ mean, covariance }: Moments): number[] {
	const dimensions = mean.length;
	const kept: number[] = [];
	const rows: Float64Array[] = [];
	for (let d = 0; d < dimensions; d++) {
		const variance = covariance[d * dimensions + d];
		if (!(Math.sqrt(variance) > ROUNDING * Math.abs(mean[d]))) continue;
		const row = new Float64Array(kept.length + 1);
		let own = 1;
		for (let k = 0; k < kept.length; k++) {
			const other = kept[k];
			let left =
				covariance[d * dimensions + other] /
				Math.sqrt(variance * covariance[other * dimensions + other]);
			for (let j = 0; j < k; j++) left -= row[j] * rows[k][j];
			row[k] = left / rows[k][k];
			own -= row[k] * row[k];
		}
		if (!(own > LEAST_OWN_SHARE)) continue;
		row[kept.length] = Math.sqrt(own);
		kept.push(d);
		rows.push(row);
	}
	return kept;
}
