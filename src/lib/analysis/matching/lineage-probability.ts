import type { Lineage } from './follow-units';

/**
 * Probability that the members of a lineage on two days are one cell: the product of its steps between
 * them, taken as independent. 1 for a day with itself.
 * @returns NaN when the lineage has no member on one of the days
 */
export function lineageProbability(
	{ members, probabilities }: Lineage,
	dayA: number,
	dayB: number
): number {
	const a = members.findIndex(({ day }) => day === dayA);
	const b = members.findIndex(({ day }) => day === dayB);
	if (a < 0 || b < 0) return NaN;
	return probabilities.slice(Math.min(a, b), Math.max(a, b)).reduce((p, step) => p * step, 1);
}
