import { assignPairs } from './assign-pairs';
import { COINCIDENCE_S, coincidentSpikes } from './coincident-spikes';

/** A unit of a new sorting that may be a unit of the old one. */
export interface Heir {
	readonly old: number;
	readonly fresh: number;
	readonly coincident: number;
	readonly shareOfOld: number;
	readonly shareOfFresh: number;
}

/** Which units of a new sorting of the same data take over from which of the old. */
export interface Inheritance {
	readonly heirs: readonly Heir[];
	/** Units that inherit nothing, each with the old unit it is most like, null when it is like none. */
	readonly withoutOld: readonly { readonly fresh: number; readonly nearest: Heir | null }[];
	/** Old units without an heir. */
	readonly withoutHeir: readonly number[];
}

/** Spikes must coincide by at least this share both ways. */
export const LEAST_SHARE = 0.8;

/**
 * Pairs the units of two sortings of the same data by spikes that fall together: both shares at least
 * `leastShare`, one to one, for the largest sum of the smaller shares. A unit that was split or merged
 * inherits from none unless one part holds nearly all of it; a person looks at the rest.
 * Units of one bundle, on one clock.
 * @param oldS, freshS spike times of each unit, ascending, s; a unit without spikes inherits nothing
 * @throws RangeError leastShare not in (0, 1]
 * Cost: O(old · fresh · spikes).
 */
export function inherit(
	oldS: readonly Float64Array[],
	freshS: readonly Float64Array[],
	withinS = COINCIDENCE_S,
	leastShare = LEAST_SHARE
): Inheritance {
	if (!(leastShare > 0 && leastShare <= 1)) {
		throw new RangeError(`least share must lie in 0 to 1, got ${leastShare}`);
	}
	const pairs = oldS.map((oldTimes, old) =>
		freshS.map((freshTimes, fresh): Heir => {
			const coincident = coincidentSpikes(oldTimes, freshTimes, withinS);
			const shareOfOld = coincident / oldTimes.length;
			return { old, fresh, coincident, shareOfOld, shareOfFresh: coincident / freshTimes.length };
		})
	);
	const shares = Float64Array.from(pairs.flat(), (heir) => {
		const share = smallerShare(heir);
		return share >= leastShare ? share : -Infinity;
	});
	const heirs = assignPairs(shares, oldS.length, freshS.length, 0).pairs.map(
		([old, fresh]) => pairs[old][fresh]
	);
	const rest = [...freshS.keys()].filter((unit) => !heirs.some(({ fresh }) => fresh === unit));
	return {
		heirs,
		withoutOld: rest.map((fresh) => ({ fresh, nearest: nearest(pairs.map((row) => row[fresh])) })),
		withoutHeir: [...oldS.keys()].filter((unit) => !heirs.some(({ old }) => old === unit))
	};
}

function smallerShare({ shareOfOld, shareOfFresh }: Heir): number {
	return Math.min(shareOfOld, shareOfFresh);
}

function nearest(column: readonly Heir[]): Heir | null {
	let best: Heir | null = null;
	for (const heir of column) {
		if (heir.coincident > 0 && !(best && heir.coincident <= best.coincident)) best = heir;
	}
	return best;
}
