import type { Random } from './seeded';

/** The whole numbers 0 … count − 1 in random order (Fisher and Yates). */
export function shuffled(count: number, random: Random): Int32Array {
	const order = Int32Array.from({ length: count }, (_, i) => i);
	for (let i = count - 1; i > 0; i--) {
		const j = random.below(i + 1);
		const kept = order[i];
		order[i] = order[j];
		order[j] = kept;
	}
	return order;
}
