import type { Random } from './seeded';

/**
 * One draw from the binomial distribution, trial by trial.
 * @param trials whole, ≥ 0
 * @param chance in [0, 1]
 * Cost: O(trials).
 */
export function drawBinomial(trials: number, chance: number, random: Random): number {
	let won = 0;
	for (let i = 0; i < trials; i++) if (random.next() < chance) won++;
	return won;
}
