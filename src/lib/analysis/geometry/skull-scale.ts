import type { StereotaxicPoint } from './stereotaxic-point';

/** Outside this range a skull is not scaled without a word why. */
export const USUAL_SCALE = { least: 0.85, most: 1.15 } as const;

/**
 * Scale of a skull against the atlas: measured over atlas distance from bregma to lambda. The atlas
 * distance belongs to the atlas and the strain and is the laboratory's own figure; 4.21 mm is printed
 * for one mouse atlas (Current Protocols in Neuroscience 2013, 4.35).
 * @param note why an unusual scale is right; blank counts as none
 * @throws RangeError a distance not above 0, or a scale outside 0.85 to 1.15 without a note
 */
export function skullScale(measuredMm: number, atlasMm: number, note = ''): number {
	for (const mm of [measuredMm, atlasMm]) {
		if (!(mm > 0 && Number.isFinite(mm))) {
			throw new RangeError(`the distance from bregma to lambda must be above 0 mm, got ${mm}`);
		}
	}
	const scale = measuredMm / atlasMm;
	if ((scale < USUAL_SCALE.least || scale > USUAL_SCALE.most) && note.trim() === '') {
		throw new RangeError(
			`a scale of ${scale.toFixed(3)} lies outside ${USUAL_SCALE.least} to ${USUAL_SCALE.most}; say why in a note`
		);
	}
	return scale;
}

/**
 * Atlas coordinates scaled to a skull; AP always, ML and DV as the laboratory has it.
 * @param scale as `skullScale` gives it
 */
export function scaledToSkull(
	{ apMm, mlMm, dvMm }: StereotaxicPoint,
	scale: number,
	axes: { readonly ml: boolean; readonly dv: boolean }
): StereotaxicPoint {
	return {
		apMm: apMm * scale,
		mlMm: axes.ml ? mlMm * scale : mlMm,
		dvMm: axes.dv ? dvMm * scale : dvMm
	};
}
