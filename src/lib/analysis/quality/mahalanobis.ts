import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { momentsOf, type Features } from './covariance';
import { LEAST_OWN_SHARE } from './live-dimensions';

/**
 * Squared Mahalanobis distances of points from a cluster, with the cluster's own mean and covariance
 * (divided by n − 1), in the given dimensions alone.
 * @param live dimensions to use
 * @returns one for each point; null where the cluster has no covariance to measure with: no more
 * spikes than dimensions, or a spread of zero in some direction
 * @throws RangeError a value that is not finite
 * Cost: O((n + points) · dimensions²).
 */
export function mahalanobis(
	cluster: Features,
	points: Features,
	live: readonly number[]
): Float64Array | null {
	const { dimensions } = cluster;
	const size = live.length;
	const { count, mean, covariance } = momentsOf([cluster], dimensions);
	if (size === 0 || count <= size) return null;
	// Each dimension in its own standard deviation, so that units of measure cannot make it singular.
	const sd = live.map((d) => Math.sqrt(covariance[d * dimensions + d]));
	if (sd.some((one) => !(one > 0))) return null;
	const correlation = new Matrix(
		live.map((d, i) => live.map((e, j) => covariance[d * dimensions + e] / (sd[i] * sd[j])))
	);
	const factor = new CholeskyDecomposition(correlation);
	if (!factor.isPositiveDefinite()) return null;
	const lower = factor.lowerTriangularMatrix.to2DArray();
	if (lower.some((row, i) => !(row[i] * row[i] > LEAST_OWN_SHARE))) return null;
	const { values } = points;
	const squared = new Float64Array(values.length / dimensions);
	const solved = new Float64Array(size);
	for (let p = 0; p < squared.length; p++) {
		for (let i = 0; i < size; i++) {
			let left = (values[p * dimensions + live[i]] - mean[live[i]]) / sd[i];
			for (let j = 0; j < i; j++) left -= lower[i][j] * solved[j];
			solved[i] = left / lower[i][i];
			squared[p] += solved[i] * solved[i];
		}
	}
	return squared;
}
