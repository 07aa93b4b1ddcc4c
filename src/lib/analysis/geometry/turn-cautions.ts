import type { ScrewSettings } from './fold-turns';
import { isTravelLow } from './travel-left';

/** Why a turn should be looked at twice before it is done. */
export type TurnCaution = 'more-than-one-turn' | 'reverses' | 'little-travel-left';

/**
 * What to ask about a turn: more than one whole turn at once, a change of direction (it takes up
 * slack), or less than one smallest step and 100 µm of travel left afterwards.
 * @param last         the turn before, 0 when there is none
 * @param travelLeftUm after this turn
 */
export function turnCautions(
	turns: number,
	last: number,
	travelLeftUm: number,
	{ pitchUm, smallestStepTurns }: Pick<ScrewSettings, 'pitchUm'> & { smallestStepTurns: number }
): TurnCaution[] {
	const cautions: TurnCaution[] = [];
	if (Math.abs(turns) > 1) cautions.push('more-than-one-turn');
	// A first turn back reverses too: the screw stands engaged downwards at surgery.
	if (turns < 0 ? last >= 0 : last < 0 && turns > 0) cautions.push('reverses');
	if (isTravelLow(travelLeftUm, smallestStepTurns * pitchUm)) cautions.push('little-travel-left');
	return cautions;
}
