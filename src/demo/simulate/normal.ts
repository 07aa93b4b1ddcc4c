import type { Random } from '$lib/analysis/random/seeded';

/** One draw from the standard normal distribution (Box and Muller 1958). */
export function normal(random: Random): number {
	// 1 − u lies in (0, 1], so the logarithm is finite.
	const radius = Math.sqrt(-2 * Math.log(1 - random.next()));
	return radius * Math.cos(2 * Math.PI * random.next());
}

/** Uniform between two figures. */
export function between(random: Random, least: number, most: number): number {
	return least + (most - least) * random.next();
}
