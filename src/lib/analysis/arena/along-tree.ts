import type { Arena } from './arena';
import type { Metric } from './metric';
import { projectOnSegment, segmentsOf } from './project-on-pieces';

/** Share of the way along the maze that counts against a piece, to stop flicker at junctions. */
const REACH_WEIGHT = 0.3;
/**
 * A longer way counts as this: the animal was out of sight, and no arm is likelier for being nearer
 * to where it was last seen. A sample to the next is a few centimetres at most.
 */
const LONGEST_REACH_CM = 20;
/** An end belongs to its own piece: the next piece on the common axis may be another arm. */
const JUST_SHORT_OF = 1 - 1e-9;

/**
 * Distance along a branched maze. A sample takes the piece with the least
 * (distance from the piece) + 0.3 · (way along the maze from the sample before, at most 20 cm), so
 * that the path does not jump between arms where they meet.
 * @returns alongCm and offCm, NaN where x or y is NaN
 * Cost: O(samples · pieces).
 */
export function alongTree(
	arena: Extract<Arena, { kind: 'tree' }>,
	metric: Metric,
	xCm: Float64Array,
	yCm: Float64Array
): { alongCm: Float64Array; offCm: Float64Array } {
	const segments = segmentsOf(arena);
	const alongCm = new Float64Array(xCm.length).fill(NaN);
	const offCm = new Float64Array(xCm.length).fill(NaN);
	let before = NaN;
	for (let i = 0; i < xCm.length; i++) {
		if (Number.isNaN(xCm[i] + yCm[i])) continue;
		let least = Infinity;
		for (const segment of segments) {
			const foot = projectOnSegment(segment, xCm[i], yCm[i]);
			const along = Math.min(foot.alongCm, segment.startCm + segment.lengthCm * JUST_SHORT_OF);
			const reach = Number.isNaN(before) ? 0 : metric(before, NaN, along, NaN);
			const cost = foot.offCm + REACH_WEIGHT * Math.min(reach, LONGEST_REACH_CM);
			if (cost < least) {
				least = cost;
				alongCm[i] = along;
				offCm[i] = foot.offCm;
			}
		}
		before = alongCm[i];
	}
	return { alongCm, offCm };
}
