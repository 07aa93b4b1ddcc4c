import type { Point } from './arena';

/** A line through the plane: a point on it and its unit direction. */
export interface Axis {
	readonly centre: Point;
	readonly directionX: number;
	readonly directionY: number;
}

/**
 * Direction of largest spread of the samples, its larger component positive.
 * @param isIncluded samples that count; samples that are not finite are left out
 * @returns null when all samples coincide
 * Cost: O(n).
 */
export function principalAxis(
	xCm: Float64Array,
	yCm: Float64Array,
	isIncluded: (sample: number) => boolean
): Axis | null {
	let n = 0;
	let meanX = 0;
	let meanY = 0;
	const isGood = (i: number) => isIncluded(i) && Number.isFinite(xCm[i]) && Number.isFinite(yCm[i]);
	for (let i = 0; i < xCm.length; i++) {
		if (!isGood(i)) continue;
		n++;
		meanX += (xCm[i] - meanX) / n;
		meanY += (yCm[i] - meanY) / n;
	}
	let xx = 0;
	let xy = 0;
	let yy = 0;
	for (let i = 0; i < xCm.length; i++) {
		if (!isGood(i)) continue;
		xx += (xCm[i] - meanX) ** 2;
		xy += (xCm[i] - meanX) * (yCm[i] - meanY);
		yy += (yCm[i] - meanY) ** 2;
	}
	if (!(xx + yy > 0)) return null;
	const angle = Math.atan2(2 * xy, xx - yy) / 2;
	const x = Math.cos(angle);
	const y = Math.sin(angle);
	const sign = (Math.abs(x) >= Math.abs(y) ? x : y) < 0 ? -1 : 1;
	return { centre: { xCm: meanX, yCm: meanY }, directionX: sign * x, directionY: sign * y };
}
