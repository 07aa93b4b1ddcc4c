import type { ScrewSettings } from './fold-turns';

/** Kept beyond one step before a drive is called at its end, µm (common practice). */
export const TRAVEL_RESERVE_UM = 100;

/** What a drive has left. */
export interface TravelLeft {
	/** Travel limit − carriage; below 0 once the limit is passed. */
	readonly leftUm: number;
	readonly leftTurns: number;
	/** Less is left than one step and the reserve. */
	readonly isLow: boolean;
}

/** True when a drive should not be counted on for another step: less than the step and 100 µm. */
export function isTravelLow(leftUm: number, stepUm: number): boolean {
	return leftUm < stepUm + TRAVEL_RESERVE_UM;
}

/**
 * Travel that remains below a carriage.
 * @param carriageUm where the carriage (not the screw) stands
 * @param travelUm   where the carriage meets its stop, from the same zero
 * @throws RangeError pitch not above 0
 */
export function travelLeft(
	carriageUm: number,
	travelUm: number,
	{ pitchUm, smallestStepTurns }: Pick<ScrewSettings, 'pitchUm'> & { smallestStepTurns: number }
): TravelLeft {
	if (!(pitchUm > 0)) throw new RangeError(`pitch must be above 0, got ${pitchUm}`);
	const leftUm = travelUm - carriageUm;
	return {
		leftUm,
		leftTurns: leftUm / pitchUm,
		isLow: isTravelLow(leftUm, smallestStepTurns * pitchUm)
	};
}
