import type { Arena } from '../arena/arena';
import { metricOf } from '../arena/metric';
import { fillGaps, LONGEST_GAP_S } from './fill-gaps';
import { rejectJumps } from './jumps';
import { onUnwrapped } from './on-unwrapped';
import { SMOOTH_TIME_S, smoothInTime } from './smooth-in-time';

/** What was done to a sample; flags add up. */
export const SAMPLE_FLAGS = {
	/** The animal cannot have been there; the recorded place is not used. */
	jump: 1,
	/** The place stands on the line between its neighbours. */
	filled: 2,
	/** No place is known. */
	missing: 4
} as const;

export interface CleanSettings {
	readonly fastestCmS: number;
	readonly longestGapS?: number;
	/** 0 for no smoothing. */
	readonly smoothS?: number;
}

/** A path without jumps and short gaps. */
export interface CleanPath {
	/** NaN where no place is known. */
	readonly xCm: Float64Array;
	/** Null where the path came with one coordinate. */
	readonly yCm: Float64Array | null;
	/** Sum of `SAMPLE_FLAGS` for each sample; 0 outside every stretch. */
	readonly flags: Uint8Array;
}

/**
 * Cleans a recorded path: rejects jumps, fills short gaps, smooths in time, in this order.
 * Nothing vanishes silently: `flags` says of every sample what was done to it. A sample with one of
 * two coordinates counts as unknown.
 * @param yCm     null for a distance along a track
 * @param stretch stretch of each sample, −1 for none
 * @param ring    the ring that `xCm` runs along, when it does; without it a seam looks like a jump
 * @throws RangeError a ring with two coordinates, or settings out of range
 * Inputs stay untouched. Cost: O(n · samples in 4 smoothing widths).
 */
export function cleanPath(
	tS: Float64Array,
	xCm: Float64Array,
	yCm: Float64Array | null,
	stretch: Int32Array,
	{ fastestCmS, longestGapS = LONGEST_GAP_S, smoothS = SMOOTH_TIME_S }: CleanSettings,
	ring?: Extract<Arena, { kind: 'ring' }>
): CleanPath {
	if (ring && yCm) throw new RangeError('linearise a path before cleaning it along a ring');
	const metric = ring
		? metricOf(ring)
		: (aX: number, aY: number, bX: number, bY: number) => Math.hypot(bX - aX, bY - aY);
	const across = yCm ?? new Float64Array(xCm.length);
	const isJump = rejectJumps(tS, xCm, across, stretch, metric, fastestCmS);
	const flags = isJump.map((jump) => (jump ? SAMPLE_FLAGS.jump : 0));
	const isKnown = (i: number) => !isJump[i] && !Number.isNaN(xCm[i] + across[i]);
	const clean = (values: Float64Array) => {
		const known = values.map((value, i) => (isKnown(i) ? value : NaN));
		const steps = (run: Float64Array) =>
			smoothInTime(tS, fillGaps(tS, run, stretch, longestGapS), stretch, smoothS);
		return ring ? onUnwrapped(known, ring.lengthCm, steps) : steps(known);
	};
	const x = clean(xCm);
	const y = yCm && clean(yCm);
	for (let i = 0; i < flags.length; i++) {
		if (stretch[i] < 0) continue;
		if (Number.isNaN(x[i])) flags[i] |= SAMPLE_FLAGS.missing;
		else if (!isKnown(i)) flags[i] |= SAMPLE_FLAGS.filled;
	}
	return { xCm: x, yCm: y, flags };
}
