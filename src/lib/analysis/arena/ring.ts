/** Mathematical remainder, in [0, n) for n > 0. */
export function mod(a: number, n: number): number {
	return ((a % n) + n) % n;
}

/** Signed way from a to b on a ring of circumference `lengthCm`, in [−C/2, C/2). */
export function ringStep(aCm: number, bCm: number, lengthCm: number): number {
	return mod(bCm - aCm + lengthCm / 2, lengthCm) - lengthCm / 2;
}

/**
 * Distance run on a ring, laps added up: a step beyond half the ring is taken the short way round.
 * NaN samples stay NaN and the count goes on from the last known one.
 */
export function unwrapRing(xCm: ArrayLike<number>, lengthCm: number): Float64Array {
	const out = new Float64Array(xCm.length).fill(NaN);
	let last = NaN;
	let total = NaN;
	for (let i = 0; i < xCm.length; i++) {
		if (!Number.isFinite(xCm[i])) continue;
		total = Number.isNaN(total) ? xCm[i] : total + ringStep(last, xCm[i], lengthCm);
		last = xCm[i];
		out[i] = total;
	}
	return out;
}

/** Distance along a ring from its angle; zero at `zeroAngle`, growing anticlockwise (y upward). */
export function ringPosition(
	xCm: number,
	yCm: number,
	centre: { readonly xCm: number; readonly yCm: number },
	lengthCm: number,
	zeroAngle = 0
): number {
	const angle = Math.atan2(yCm - centre.yCm, xCm - centre.xCm) - zeroAngle;
	return (lengthCm * mod(angle, 2 * Math.PI)) / (2 * Math.PI);
}

/** How far outside (above 0) or inside (below 0) the circle of a ring a point lies, cm. */
export function ringOffset(
	xCm: number,
	yCm: number,
	centre: { readonly xCm: number; readonly yCm: number },
	lengthCm: number
): number {
	return Math.hypot(xCm - centre.xCm, yCm - centre.yCm) - lengthCm / (2 * Math.PI);
}
