import type { Point } from './arena';

/**
 * Centre of the circle that lies closest to the points: least squares of x² + y² + ax + by + c
 * (Kåsa 1976). Good when most of the circle was visited, biased inward on short arcs.
 * @param isIncluded samples to use; samples that are not finite are left out
 * @returns NaN coordinates when the points lie on a line
 */
export function circleCentre(
	xCm: Float64Array,
	yCm: Float64Array,
	isIncluded: (sample: number) => boolean
): Point {
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
	let yy = 0;
	let xy = 0;
	let xr = 0;
	let yr = 0;
	for (let i = 0; i < xCm.length; i++) {
		if (!isGood(i)) continue;
		const x = xCm[i] - meanX;
		const y = yCm[i] - meanY;
		const r = x * x + y * y;
		xx += x * x;
		yy += y * y;
		xy += x * y;
		xr += x * r;
		yr += y * r;
	}
	const determinant = 2 * (xx * yy - xy * xy);
	if (!(Math.abs(determinant) > 1e-9 * xx * yy)) return { xCm: NaN, yCm: NaN };
	return {
		xCm: meanX + (xr * yy - yr * xy) / determinant,
		yCm: meanY + (yr * xx - xr * xy) / determinant
	};
}
