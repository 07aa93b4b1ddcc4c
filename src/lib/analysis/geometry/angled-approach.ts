import { radians } from './angle';
import type { StereotaxicPoint } from './stereotaxic-point';

/** The plane in which a track leans: sagittal along AP, coronal along ML. */
export type TiltPlane = 'sagittal' | 'coronal';

/** How to reach a target along a leaning track. */
export interface Approach {
	readonly entry: StereotaxicPoint;
	/** Target − entry on the axis the track leans along. */
	readonly offsetMm: number;
	/** From the surface to the target along the track. */
	readonly pathMm: number;
}

/**
 * Where to enter, and how far to go, to reach a target at an angle in one plane. With h the height
 * of the surface above the target: offset h tan θ, path h / cos θ.
 * @param surfaceDvMm depth of the brain surface at the entry, on the target's scale
 * @param angleDeg    from the vertical; positive where the tip travels towards + of the leaning axis
 *                    as it descends, so that the entry lies on the − side
 * @throws RangeError the target not below the surface, or an angle of 90° or more either way
 */
export function angledApproach(
	target: StereotaxicPoint,
	surfaceDvMm: number,
	angleDeg: number,
	plane: TiltPlane
): Approach {
	const heightMm = target.dvMm - surfaceDvMm;
	if (!(heightMm > 0)) {
		throw new RangeError(
			`the target must lie below the surface, got ${target.dvMm} and ${surfaceDvMm} mm`
		);
	}
	if (!(Math.abs(angleDeg) < 90)) {
		throw new RangeError(`the angle must lie between −90° and 90°, got ${angleDeg}`);
	}
	const offsetMm = heightMm * Math.tan(radians(angleDeg));
	return {
		entry: {
			apMm: plane === 'sagittal' ? target.apMm - offsetMm : target.apMm,
			mlMm: plane === 'coronal' ? target.mlMm - offsetMm : target.mlMm,
			dvMm: surfaceDvMm
		},
		offsetMm,
		pathMm: heightMm / Math.cos(radians(angleDeg))
	};
}
