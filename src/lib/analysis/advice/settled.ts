import type { Move } from './history';
import type { AdviceParameters } from './parameters';

/** Hours of rest after a move: small ones need less. */
function restH({ um }: Move, parameters: AdviceParameters): number {
	return Math.abs(um) <= parameters.smallMoveUm ? parameters.smallSettlingH : parameters.settlingH;
}

/**
 * When the last of the moves made so far has settled, hours on the animal's axis; −∞ without moves.
 * A bundle is settled from that moment on.
 */
export function settledAtH(
	moves: readonly Move[],
	atH: number,
	parameters: AdviceParameters
): number {
	let settled = -Infinity;
	for (const move of moves) {
		if (move.atH <= atH) settled = Math.max(settled, move.atH + restH(move, parameters));
	}
	return settled;
}
