import { quantile } from '../statistics/quantile';

/** What two days of maps look like taken together. */
export type Remapping =
	| 'stable'
	| 'rate-remapping'
	| 'global-change'
	/** Above the null, but under half of what the session has with itself. */
	| 'partial'
	/** A drive was moved: a change of cells looks the same. */
	| 'withheld'
	| 'not-known';

/** What the label is read from. */
export interface RemappingEvidence {
	readonly meanZ: number;
	readonly nullMeanZ: Float64Array;
	/** Mean Fisher z of the maps of one session's halves, the ceiling. */
	readonly withinSessionZ: number;
	readonly medianRateChange: number;
	/** Hours from the last move of any of the units' drives to the later day's session; Infinity for none. */
	readonly hoursSinceMove: number;
}

/** A label waits this long after a move, h. */
export const MOVE_VEIL_H = 24;
const RATE_REMAPPING = 0.3;
const SHARE_OF_CEILING = 0.5;

/**
 * Reads a label off the figures, common practice and no test of its own: "stable" when the mean z is
 * above the 95th percentile of the null and at least half of the within-session z, "rate remapping" when
 * besides the median rate change is above 0.3, "global change" when the mean z is inside the null.
 * Within 24 h of a move the label is withheld.
 * @returns 'not-known' when a figure it needs is NaN or there is no null
 */
export function remapping(evidence: RemappingEvidence): Remapping {
	const { meanZ, nullMeanZ, withinSessionZ, medianRateChange, hoursSinceMove } = evidence;
	if (!(hoursSinceMove >= MOVE_VEIL_H)) return 'withheld';
	const bound = quantile(nullMeanZ, 0.95);
	if (Number.isNaN(meanZ) || Number.isNaN(bound)) return 'not-known';
	if (meanZ <= bound) return 'global-change';
	if (Number.isNaN(withinSessionZ)) return 'not-known';
	if (meanZ < SHARE_OF_CEILING * withinSessionZ) return 'partial';
	if (Number.isNaN(medianRateChange)) return 'not-known';
	return medianRateChange > RATE_REMAPPING ? 'rate-remapping' : 'stable';
}
