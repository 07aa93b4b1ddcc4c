import type { Random } from './seeded';

/** One draw from the standard normal distribution (Box and Muller 1958; two uniform numbers). */
export function drawNormal(random: Random): number {
	return Math.sqrt(-2 * Math.log(1 - random.next())) * Math.cos(2 * Math.PI * random.next());
}
