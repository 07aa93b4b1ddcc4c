import type { Random } from './seeded';

/** Above this the product of uniforms would take long and lose digits; larger means are split. */
const MOST_AT_ONCE = 30;

/**
 * One draw from the Poisson distribution: how many uniform numbers can be multiplied before their
 * product falls below e^−mean (Knuth). A larger mean is the sum of smaller ones.
 * @throws RangeError mean negative or not finite
 * Cost: O(mean).
 */
export function drawPoisson(mean: number, random: Random): number {
	if (!(mean >= 0 && Number.isFinite(mean))) throw new RangeError(`no Poisson mean: ${mean}`);
	let total = 0;
	for (let left = mean; left > 0; left -= MOST_AT_ONCE) {
		const least = Math.exp(-Math.min(left, MOST_AT_ONCE));
		let product = 1 - random.next();
		while (product > least) {
			total++;
			product *= 1 - random.next();
		}
	}
	return total;
}
