import type { Random } from '$lib/analysis/random/seeded';

/** Uniform between two figures. */
export function between(random: Random, least: number, most: number): number {
	return least + (most - least) * random.next();
}
