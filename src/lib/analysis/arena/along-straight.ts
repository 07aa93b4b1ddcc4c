import type { Point } from './arena';
import { principalAxis } from './principal-axis';

/** The ends of a straight track, in the frame of the positions. */
export interface Ends {
	readonly a: Point;
	readonly b: Point;
}

/**
 * Distance along a straight track.
 * With known ends: the foot on A→B, zero at A. Without: the foot on the axis of largest spread of
 * the run samples, larger component positive, zero at the lowest run sample.
 * @param isRun samples that decide axis and zero
 * @returns alongCm (not clamped) and offCm, the distance from the line
 */
export function alongStraight(
	xCm: Float64Array,
	yCm: Float64Array,
	isRun: (sample: number) => boolean,
	ends?: Ends
): { alongCm: Float64Array; offCm: Float64Array } {
	const line = ends ? lineThrough(ends) : principalAxis(xCm, yCm, isRun);
	const alongCm = new Float64Array(xCm.length).fill(NaN);
	const offCm = new Float64Array(xCm.length).fill(NaN);
	if (!line) return { alongCm, offCm };
	let lowest = Infinity;
	for (let i = 0; i < xCm.length; i++) {
		const x = xCm[i] - line.centre.xCm;
		const y = yCm[i] - line.centre.yCm;
		alongCm[i] = x * line.directionX + y * line.directionY;
		offCm[i] = Math.abs(y * line.directionX - x * line.directionY);
		if (isRun(i) && alongCm[i] < lowest) lowest = alongCm[i];
	}
	if (!ends && Number.isFinite(lowest))
		for (let i = 0; i < alongCm.length; i++) alongCm[i] -= lowest;
	return { alongCm, offCm };
}

function lineThrough({ a, b }: Ends) {
	const length = Math.hypot(b.xCm - a.xCm, b.yCm - a.yCm);
	if (!(length > 0)) throw new RangeError('the two ends of a straight track are the same point');
	return {
		centre: a,
		directionX: (b.xCm - a.xCm) / length,
		directionY: (b.yCm - a.yCm) / length
	};
}
