/** Best variance of an estimate of position, cm². */
export interface WalkPrecision {
	/** From the window and those before it. */
	readonly filteredCm2: number;
	/** From those after it too. */
	readonly smoothedCm2: number;
}

/**
 * The precision limit with memory: an animal that walks at random with variance Q per window, seen
 * with information J per window, in the steady state of the linear Gaussian filter.
 * P = (−Q + √(Q² + 4Q/J))/2 solves 1/P = J + 1/(P + Q); smoothed 1/(1/P + 1/(P + Q)).
 * Written as 2Q/J over Q + √…, which loses no digits when Q is large.
 * @param perCm2     J ≥ 0, per cm²
 * @param stepVarCm2 Q ≥ 0; 0 for an animal that stands still, which is known exactly in the end
 * @returns Infinity where nothing is seen (J = 0)
 * @throws RangeError either is negative or not finite
 */
export function walkPrecision(perCm2: number, stepVarCm2: number): WalkPrecision {
	if (!(perCm2 >= 0 && stepVarCm2 >= 0 && Number.isFinite(perCm2 + stepVarCm2))) {
		throw new RangeError(`information ${perCm2} and step variance ${stepVarCm2} must be 0 or more`);
	}
	if (perCm2 === 0) return { filteredCm2: Infinity, smoothedCm2: Infinity };
	if (stepVarCm2 === 0) return { filteredCm2: 0, smoothedCm2: 0 };
	const root = Math.sqrt(stepVarCm2 ** 2 + (4 * stepVarCm2) / perCm2);
	const filteredCm2 = (2 * stepVarCm2) / perCm2 / (stepVarCm2 + root);
	return { filteredCm2, smoothedCm2: 1 / (1 / filteredCm2 + 1 / (filteredCm2 + stepVarCm2)) };
}
