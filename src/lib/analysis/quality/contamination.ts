import { countInterval } from '../statistics/count-interval';

/** What was counted of a unit. */
export interface ViolationCount {
	readonly spikes: number;
	readonly durationS: number;
	/** Spike pairs closer than the refractory period. */
	readonly violations: number;
	readonly refractoryS: number;
	/** The detector sees no second spike within this time of one; 0 when it has no such limit. */
	readonly deadTimeS: number;
}

/** Share of foreign spikes by both forms. */
export interface Contamination {
	/** q = n_v T / (N² (τ_R − τ_C)). */
	readonly q: number;
	/** One foreign unit, itself refractory; NaN when q > ½, which reads "at least 50 %". */
	readonly oneUnit: number;
	/** Many foreign units; NaN when q > 1, which reads "not a unit". */
	readonly manyUnits: number;
}

/** The largest mean of a Poisson count that shows nothing in 1 of 20 sessions: −ln 0.05. */
export const UPPER_AT_ZERO = -Math.log(0.05);

/**
 * Share of spikes that are not the unit's own, from its refractory violations.
 *
 * Two trains of N_a and N_b spikes in T seconds give 2 τ N_a N_b/T pairs closer than τ, a Poisson
 * train with itself τ N_b²/T. With C = N_b/N and q as above: one foreign unit, itself refractory,
 * gives q = 2C(1 − C), so C = ½(1 − √(1 − 2q)) (the form of Hill, Mehta and Kleinfeld 2011); many
 * give q = 2C − C², so C = 1 − √(1 − q) (the form of Llobet, Wyngaard and Barbour 2022). Both are
 * about q/2 when small. The foreign spikes must come at random to the unit's own.
 * @returns NaN in all parts without spikes
 * @throws RangeError counts below 0, duration not above 0, or dead time not below the refractory period
 */
export function contamination(count: ViolationCount): Contamination {
	const { spikes, durationS, violations, refractoryS, deadTimeS } = count;
	if (!(spikes >= 0 && violations >= 0)) throw new RangeError('counts must not be below 0');
	if (!(durationS > 0)) throw new RangeError(`duration must be above 0 s, got ${durationS}`);
	if (!(deadTimeS >= 0 && deadTimeS < refractoryS)) {
		throw new RangeError(`dead time ${deadTimeS} s must be in 0 to under ${refractoryS} s`);
	}
	const q =
		spikes === 0 ? NaN : (violations * durationS) / (spikes * spikes * (refractoryS - deadTimeS));
	return {
		q,
		oneUnit: q <= 0.5 ? (1 - Math.sqrt(1 - 2 * q)) / 2 : NaN,
		manyUnits: q <= 1 ? 1 - Math.sqrt(1 - q) : NaN
	};
}

/**
 * The least contamination that as many violations can stand for: the count at the lower end of its
 * exact 95 % interval (Garwood 1936). Two violations may be chance, or two bursts.
 * @throws RangeError as `contamination`
 */
export function contaminationFloor(count: ViolationCount): Contamination {
	return contamination({ ...count, violations: countInterval(count.violations).low });
}

/**
 * The 95 % upper limit of contamination when no violation was seen, which proves little in a short
 * session: n_v is put at −ln 0.05 = 2.9957.
 * @returns null when there were violations; parts are NaN where the session cannot vouch for a unit
 * @throws RangeError as `contamination`
 */
export function contaminationLimit(count: ViolationCount): Contamination | null {
	if (count.violations > 0) return null;
	return contamination({ ...count, violations: UPPER_AT_ZERO });
}
