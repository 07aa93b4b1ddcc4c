/** What a reading says of a channel. */
export type ImpedanceFlag = 'ok' | 'low' | 'high' | 'short' | 'bridged' | 'open' | 'unknown';

/** Limits at 1 kHz, kΩ. */
export interface ImpedanceLimits {
	readonly shortBelowKohm: number;
	readonly openAboveKohm: number;
	readonly lowBelowKohm: number;
	readonly highAboveKohm: number;
}

/** Common practice for plated tetrode wire; bare wire and silicon sites need limits of their own. */
export const PLATED_WIRE: ImpedanceLimits = {
	shortBelowKohm: 50,
	openAboveKohm: 3000,
	lowBelowKohm: 150,
	highAboveKohm: 400
};

/** Two low channels this close to each other are taken for one conductor (common practice). */
const ALIKE = 1.05;

/**
 * Flags for the channels of one bundle: `short` and `open` are broken; `bridged` are two or more low
 * channels of nearly the same impedance, which may be joined; `low` and `high` are to be watched.
 * A reading on a limit is within it.
 * @param kohm readings of one bundle at one test; NaN, 0 and below are `unknown`
 * @throws RangeError limits out of order
 */
export function channelFlags(
	kohm: ArrayLike<number>,
	limits: ImpedanceLimits = PLATED_WIRE
): ImpedanceFlag[] {
	const { shortBelowKohm, lowBelowKohm, highAboveKohm, openAboveKohm } = limits;
	if (
		!(shortBelowKohm <= lowBelowKohm && lowBelowKohm < highAboveKohm) ||
		!(highAboveKohm <= openAboveKohm)
	) {
		throw new RangeError('limits must rise from short through low and high to open');
	}
	const readings = Array.from(kohm);
	return readings.map((reading, i) => {
		if (!(reading > 0)) return 'unknown';
		if (reading < shortBelowKohm) return 'short';
		if (reading > openAboveKohm) return 'open';
		if (reading > highAboveKohm) return 'high';
		if (reading >= lowBelowKohm) return 'ok';
		const isBridged = readings.some(
			(other, j) => j !== i && other < lowBelowKohm && areAlike(reading, other)
		);
		return isBridged ? 'bridged' : 'low';
	});
}

function areAlike(a: number, b: number): boolean {
	return a > 0 && b > 0 && Math.max(a, b) <= ALIKE * Math.min(a, b);
}

/** True for a channel that cannot record by itself. */
export function isBroken(flag: ImpedanceFlag): boolean {
	return flag === 'short' || flag === 'bridged' || flag === 'open';
}

/** True for a bundle whose hardware must be judged before its yield: two broken channels or more. */
export function needsHardwareCheck(flags: readonly ImpedanceFlag[]): boolean {
	return flags.filter(isBroken).length >= 2;
}
