import { alongStraight, type Ends } from './along-straight';
import { alongTree } from './along-tree';
import type { Arena } from './arena';
import { circleCentre } from './circle-centre';
import type { Metric } from './metric';
import { projectOnPieces, segmentsOf } from './project-on-pieces';
import { mod, ringPosition } from './ring';

/** A sample this far beyond an end or wall is taken to be at it; farther out it has no place. */
export const MARGIN_CM = 5;
/** A sample farther than this from the middle of a track is off it. */
export const OFF_TRACK_CM = 15;

/** Positions in the coordinates of the arena; NaN where a sample has no place in it. */
export interface Placed {
	readonly xCm: Float64Array;
	/** NaN in one dimension. */
	readonly yCm: Float64Array;
	/** Samples that lie outside by more than the margin, or too far from the track. */
	readonly outside: number;
}

/**
 * Puts positions into the coordinates of an arena. On a track a position with x and y is linearised,
 * one with x alone is taken as distance along it. Inputs stay untouched.
 * @param yCm   null when there is only one coordinate
 * @param isRun samples that decide axis, zero and centre where these must be found
 * @param ends  of a straight track, when they are known
 * @throws RangeError a two-dimensional arena without yCm
 */
export function placeInArena(
	arena: Arena,
	metric: Metric,
	xCm: Float64Array,
	yCm: Float64Array | null,
	isRun: (sample: number) => boolean,
	ends?: Ends
): Placed {
	if (arena.kind === 'rectangle' || arena.kind === 'disc') {
		if (!yCm) throw new RangeError(`a ${arena.kind} needs x and y, got x alone`);
		const width = arena.kind === 'disc' ? arena.diameterCm : arena.widthCm;
		const height = arena.kind === 'disc' ? arena.diameterCm : arena.heightCm;
		return keepInside(xCm, yCm, width, height);
	}
	const none = new Float64Array(xCm.length).fill(NaN);
	if (!yCm) {
		const along = arena.kind === 'ring' ? xCm.map((x) => mod(x, arena.lengthCm)) : xCm;
		return keepInside(along, null, arena.lengthCm, 0);
	}
	switch (arena.kind) {
		case 'straight': {
			const { alongCm, offCm } = alongStraight(xCm, yCm, isRun, ends);
			return keepInside(ends ? onTrack(alongCm, offCm) : alongCm, null, arena.lengthCm, 0);
		}
		case 'ring': {
			const centre = circleCentre(xCm, yCm, isRun);
			const along = none.map((_, i) => ringPosition(xCm[i], yCm[i], centre, arena.lengthCm));
			return keepInside(along, null, arena.lengthCm, 0);
		}
		case 'polyline': {
			const segments = segmentsOf(arena);
			const offCm = new Float64Array(xCm.length);
			const along = none.map((_, i) => {
				const foot = projectOnPieces(segments, xCm[i], yCm[i]);
				offCm[i] = foot.offCm;
				return foot.alongCm;
			});
			return keepInside(onTrack(along, offCm), null, arena.lengthCm, 0);
		}
		case 'tree': {
			const { alongCm, offCm } = alongTree(arena, metric, xCm, yCm);
			return keepInside(onTrack(alongCm, offCm), null, arena.lengthCm, 0);
		}
	}
}

function onTrack(alongCm: Float64Array, offCm: Float64Array): Float64Array {
	return alongCm.map((along, i) => (offCm[i] > OFF_TRACK_CM ? NaN : along));
}

/** Clamps what is barely outside, drops what is far outside. */
function keepInside(
	xCm: Float64Array,
	yCm: Float64Array | null,
	widthCm: number,
	heightCm: number
): Placed {
	const x = new Float64Array(xCm.length).fill(NaN);
	const y = new Float64Array(xCm.length).fill(NaN);
	let outside = 0;
	const isNear = (value: number, length: number) =>
		value >= -MARGIN_CM && value <= length + MARGIN_CM;
	const clamp = (value: number, length: number) => Math.max(0, Math.min(length, value));
	for (let i = 0; i < xCm.length; i++) {
		if (!isNear(xCm[i], widthCm) || (yCm && !isNear(yCm[i], heightCm))) {
			outside++;
			continue;
		}
		x[i] = clamp(xCm[i], widthCm);
		if (yCm) y[i] = clamp(yCm[i], heightCm);
	}
	return { xCm: x, yCm: y, outside };
}
