import { chiSquaredQuantile } from './chi-squared';

/**
 * Exact limits of a Poisson mean when n was counted (Garwood 1936): ½ χ²(2n) and ½ χ²(2n + 2); the
 * lower one is 0 for n = 0.
 * @param n     whole, ≥ 0
 * @param level in (0, 1)
 * @throws RangeError n or level out of range
 */
export function countInterval(n: number, level = 0.95): { low: number; high: number } {
	if (!(Number.isInteger(n) && n >= 0)) throw new RangeError(`not a count: ${n}`);
	if (!(level > 0 && level < 1)) throw new RangeError(`level ${level} is outside 0 to 1`);
	const tail = (1 - level) / 2;
	return {
		low: n === 0 ? 0 : chiSquaredQuantile(tail, 2 * n) / 2,
		high: chiSquaredQuantile(1 - tail, 2 * n + 2) / 2
	};
}
