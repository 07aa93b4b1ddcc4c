/** Points of a feature space. */
export interface Features {
	/** Row-major [spike][dimension], finite. */
	readonly values: Float64Array;
	readonly dimensions: number;
}

/** First two moments of a cloud of points. */
export interface Moments {
	readonly count: number;
	readonly mean: Float64Array;
	/** Row-major [dimension][dimension], divided by n − 1; NaN with fewer than two points. */
	readonly covariance: Float64Array;
}

/**
 * Mean and covariance (n − 1) of all points of the given clouds together.
 * Two passes, means first. Cost: O(points · dimensions²).
 * @throws RangeError a value that is not finite, or values that do not divide by the dimensions
 */
export function momentsOf(clouds: readonly Features[], dimensions: number): Moments {
	const mean = new Float64Array(dimensions);
	let count = 0;
	for (const { values } of clouds) {
		if (values.length % dimensions !== 0) {
			throw new RangeError(`${values.length} values do not divide by ${dimensions} dimensions`);
		}
		count += values.length / dimensions;
		for (let i = 0; i < values.length; i++) {
			if (!Number.isFinite(values[i])) throw new RangeError(`value ${i} is not finite`);
			mean[i % dimensions] += values[i];
		}
	}
	for (let d = 0; d < dimensions; d++) mean[d] /= count;
	const covariance = new Float64Array(dimensions * dimensions);
	for (const { values } of clouds) {
		for (let at = 0; at < values.length; at += dimensions) {
			for (let d = 0; d < dimensions; d++) {
				const from = values[at + d] - mean[d];
				for (let e = 0; e <= d; e++) {
					covariance[d * dimensions + e] += from * (values[at + e] - mean[e]);
				}
			}
		}
	}
	for (let d = 0; d < dimensions; d++) {
		for (let e = 0; e <= d; e++) {
			const value = count > 1 ? covariance[d * dimensions + e] / (count - 1) : NaN;
			covariance[d * dimensions + e] = value;
			covariance[e * dimensions + d] = value;
		}
	}
	return { count, mean, covariance };
}
