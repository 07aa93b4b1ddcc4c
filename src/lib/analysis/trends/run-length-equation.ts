import { Matrix, solve } from 'ml-matrix';

/**
 * Mean number of steps until a chain leaves its states: l = 1 + P l, solved for the first state.
 * @param states  where the chain may stand
 * @param chance  of moving from a state's value to the j-th state; what is missing to 1 is leaving
 * Source: Brook and Evans 1972. Cost: O(states³).
 */
export function runLength(
	states: ArrayLike<number>,
	chance: (from: number, j: number) => number
): number {
	const n = states.length;
	const system = new Matrix(n, n);
	for (let i = 0; i < n; i++) {
		for (let j = 0; j < n; j++) system.set(i, j, (i === j ? 1 : 0) - chance(states[i], j));
	}
	return solve(system, Matrix.ones(n, 1)).get(0, 0);
}
