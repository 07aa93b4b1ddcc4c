import { radians } from './angle';
import type { StereotaxicPoint } from './stereotaxic-point';

/** A rotation as a 3 × 3 matrix, row-major, for column vectors (AP, ML, DV). */
export type Rotation = Float64Array;

/**
 * Yaw about DV, then pitch about ML, then roll about AP, each about the axes as turned so far:
 * M = Rz(yaw) · Ry(pitch) · Rx(roll).
 * @throws RangeError an angle that is not a finite number
 */
export function rotationOf(yawDeg: number, pitchDeg: number, rollDeg: number): Rotation {
	for (const angle of [yawDeg, pitchDeg, rollDeg]) {
		if (!Number.isFinite(angle)) throw new RangeError(`an angle is no number: ${angle}`);
	}
	const [sinY, cosY] = [Math.sin(radians(yawDeg)), Math.cos(radians(yawDeg))];
	const [sinP, cosP] = [Math.sin(radians(pitchDeg)), Math.cos(radians(pitchDeg))];
	const [sinR, cosR] = [Math.sin(radians(rollDeg)), Math.cos(radians(rollDeg))];
	return Float64Array.of(
		cosY * cosP,
		cosY * sinP * sinR - sinY * cosR,
		cosY * sinP * cosR + sinY * sinR,
		sinY * cosP,
		sinY * sinP * sinR + cosY * cosR,
		sinY * sinP * cosR - cosY * sinR,
		-sinP,
		cosP * sinR,
		cosP * cosR
	);
}

/** M · v. */
export function rotate(m: Rotation, { apMm, mlMm, dvMm }: StereotaxicPoint): StereotaxicPoint {
	return {
		apMm: m[0] * apMm + m[1] * mlMm + m[2] * dvMm,
		mlMm: m[3] * apMm + m[4] * mlMm + m[5] * dvMm,
		dvMm: m[6] * apMm + m[7] * mlMm + m[8] * dvMm
	};
}

/** Mᵀ · v, which undoes `rotate`. */
export function rotateBack(m: Rotation, { apMm, mlMm, dvMm }: StereotaxicPoint): StereotaxicPoint {
	return {
		apMm: m[0] * apMm + m[3] * mlMm + m[6] * dvMm,
		mlMm: m[1] * apMm + m[4] * mlMm + m[7] * dvMm,
		dvMm: m[2] * apMm + m[5] * mlMm + m[8] * dvMm
	};
}
