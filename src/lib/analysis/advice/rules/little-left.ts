import type { Evidence } from '../advice';
import type { AdviceParameters } from '../parameters';

/** Whether moving risks next to nothing: one unit at most, or a worth surely below the least that counts. */
export function hasLittleLeft(
	{ units, worth }: Pick<Evidence, 'units' | 'worth'>,
	{ leastWorthBits }: AdviceParameters
): boolean {
	return (units !== null && units <= 1) || (worth !== null && worth.high < leastWorthBits);
}
