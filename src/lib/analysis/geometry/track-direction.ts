import { radians } from './angle';
import { lengthOf, plus, times, type StereotaxicPoint } from './stereotaxic-point';

/**
 * Which way a tip goes as it descends, by tilt and azimuth: (sin θ cos φ, sin θ sin φ, cos θ).
 * @param tiltDeg    θ from the vertical, −90 to 90 without the ends
 * @param azimuthDeg φ from anterior towards the right, where the tip heads as it descends
 * @returns unit vector
 * @throws RangeError a track that does not descend, or an angle that is no number
 */
export function directionByTilt(tiltDeg: number, azimuthDeg: number): StereotaxicPoint {
	demandDescent('tilt', tiltDeg);
	if (!Number.isFinite(azimuthDeg)) throw new RangeError(`azimuth is no number: ${azimuthDeg}`);
	const tilt = radians(tiltDeg);
	const azimuth = radians(azimuthDeg);
	return {
		apMm: Math.sin(tilt) * Math.cos(azimuth),
		mlMm: Math.sin(tilt) * Math.sin(azimuth),
		dvMm: Math.cos(tilt)
	};
}

/**
 * Which way a tip goes, by the angles its track shows from the side and from the front, as devices
 * with two arcs read them: (tan α, tan β, 1), normalised.
 * @param sagittalDeg α from the vertical towards anterior, seen from the side
 * @param coronalDeg  β from the vertical towards the right, seen from the front
 * @returns unit vector
 * @throws RangeError an angle of 90° or more either way
 */
export function directionByProjections(sagittalDeg: number, coronalDeg: number): StereotaxicPoint {
	demandDescent('sagittal angle', sagittalDeg);
	demandDescent('coronal angle', coronalDeg);
	const slope = {
		apMm: Math.tan(radians(sagittalDeg)),
		mlMm: Math.tan(radians(coronalDeg)),
		dvMm: 1
	};
	return times(slope, 1 / lengthOf(slope));
}

/**
 * Where a tip lies: entry + depth · direction.
 * @param depthMm   along the track, from the entry
 * @param direction unit vector
 */
export function tipPosition(
	entry: StereotaxicPoint,
	direction: StereotaxicPoint,
	depthMm: number
): StereotaxicPoint {
	return plus(entry, times(direction, depthMm));
}

function demandDescent(what: string, angleDeg: number): void {
	if (!(Math.abs(angleDeg) < 90)) {
		throw new RangeError(`the ${what} must lie between −90° and 90°, got ${angleDeg}`);
	}
}
