import type { SkullPoints } from './skull-frame';

/** Height differences that still count as level, mm (common practice: 0.05 to 0.1). */
export const LEVEL_MM = 0.1;

/** Readings of a hundredth of a millimetre are no exact binary fractions. */
const SLACK_MM = 1e-9;

/** Whether a skull sits level. */
export interface SkullLevel {
	readonly isLevel: boolean;
	/** Lambda − bregma; positive is nose up. */
	readonly noseUpMm: number;
	/** Right − left; positive is right side down. NaN when the sides were not measured. */
	readonly rightDownMm: number;
}

/**
 * Whether bregma and lambda, and the sides where they were measured, stand equally deep.
 * @param toleranceMm largest difference that passes, for both
 * @throws RangeError toleranceMm negative
 */
export function skullLevel(
	{ bregma, lambda, sides }: SkullPoints,
	toleranceMm = LEVEL_MM
): SkullLevel {
	if (!(toleranceMm >= 0)) throw new RangeError(`tolerance must be 0 or more, got ${toleranceMm}`);
	const noseUpMm = lambda.dvMm - bregma.dvMm;
	const rightDownMm = sides ? sides.right.dvMm - sides.left.dvMm : NaN;
	const passes = (mm: number) => Math.abs(mm) <= toleranceMm + SLACK_MM;
	return {
		isLevel: passes(noseUpMm) && (!sides || passes(rightDownMm)),
		noseUpMm,
		rightDownMm
	};
}
