import type { Random } from './seeded';

/** Chance of the first term must not vanish: more trials than this are split. */
const MOST_AT_ONCE = 256;

/**
 * One draw from the binomial distribution: one uniform number, followed up the distribution from its
 * nearer end.
 * @param trials whole, ≥ 0
 * @param chance in [0, 1]
 * Cost: O(trials · min(chance, 1 − chance)).
 */
export function drawBinomial(trials: number, chance: number, random: Random): number {
	if (chance > 0.5) return trials - drawBinomial(trials, 1 - chance, random);
	let won = 0;
	for (let left = trials; left > 0; left -= MOST_AT_ONCE) {
		won += drawAtOnce(Math.min(left, MOST_AT_ONCE), chance, random.next());
	}
	return won;
}

function drawAtOnce(trials: number, chance: number, uniform: number): number {
	const odds = chance / (1 - chance);
	let term = (1 - chance) ** trials;
	let below = term;
	let k = 0;
	while (uniform >= below && k < trials) {
		term *= ((trials - k) / (k + 1)) * odds;
		below += term;
		k++;
	}
	return k;
}
