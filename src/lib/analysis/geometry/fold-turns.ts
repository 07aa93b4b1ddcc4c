/** What a screw does to its carriage. */
export interface ScrewSettings {
	/** Carriage travel per turn. */
	readonly pitchUm: number;
	/** Slack taken up before the carriage follows a reversal. */
	readonly backlashUm: number;
	/** Where screw and carriage stand before the first turn, engaged downwards. */
	readonly startUm?: number;
}

/**
 * Where a screw and its carriage stand after each turn, in the order given.
 * Screw u = start + Σ turns × pitch. Carriage y = min(max(y, u), u + backlash): a reversal first
 * takes up the slack. Down is positive.
 * @param turns signed, in the order they were done; corrections already applied
 * @returns screwUm and carriageUm, same length as `turns`
 * @throws RangeError pitch not above 0, backlash below 0
 * Cost: O(n).
 */
export function foldTurns(
	turns: ArrayLike<number>,
	{ pitchUm, backlashUm, startUm = 0 }: ScrewSettings
): { screwUm: Float64Array; carriageUm: Float64Array } {
	if (!(pitchUm > 0)) throw new RangeError(`pitch must be above 0, got ${pitchUm}`);
	if (!(backlashUm >= 0)) throw new RangeError(`backlash must be 0 or more, got ${backlashUm}`);
	const screwUm = new Float64Array(turns.length);
	const carriageUm = new Float64Array(turns.length);
	let sumTurns = 0;
	let carriage = startUm;
	for (let i = 0; i < turns.length; i++) {
		// One product of the sum: adding rounded micrometres would drift over a long ledger.
		sumTurns += turns[i];
		const screw = startUm + sumTurns * pitchUm;
		carriage = Math.min(Math.max(carriage, screw), screw + backlashUm);
		screwUm[i] = screw;
		carriageUm[i] = carriage;
	}
	return { screwUm, carriageUm };
}
