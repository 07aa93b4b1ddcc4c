import { normalDensity } from '../statistics/normal';
import { runLength } from './run-length-equation';
import { gaussLegendre } from './gauss-legendre';

/**
 * Mean number of values until a two-sided EWMA chart with fixed limits signals: independent normal
 * values of unit variance, z started at the target.
 * The integral equation of Crowder (1987), by Gauss–Legendre quadrature: nodes enough for the
 * narrowest kernel, λ = 0.03, at 1e-7.
 * @param lambda in (0, 1]
 * @param width  L, limits in standard deviations of z, > 0
 * @param shift  of the mean, in standard deviations of one value
 * @throws RangeError lambda or width out of range
 * Cost: O(nodes³), about 10 ms.
 */
export function ewmaRunLength(lambda: number, width: number, shift: number): number {
	if (!(lambda > 0 && lambda <= 1)) throw new RangeError(`lambda ${lambda} is outside 0 to 1`);
	if (!(width > 0)) throw new RangeError(`width must be above 0: ${width}`);
	const limit = width * Math.sqrt(lambda / (2 - lambda));
	const nodes = Math.max(48, Math.ceil((12 * limit) / lambda));
	const { x, weight } = gaussLegendre(nodes, -limit, limit);
	const step = (from: number, to: number) =>
		normalDensity((to - (1 - lambda) * from) / lambda - shift) / lambda;
	return runLength(Float64Array.of(0, ...x), (from, j) =>
		j === 0 ? 0 : step(from, x[j - 1]) * weight[j - 1]
	);
}
