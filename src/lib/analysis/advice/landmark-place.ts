import type { LandmarkPlace } from './history';

/** What was seen on a hippocampal (CA1) bundle. */
export interface LandmarkSigns {
	/** Deflection of the sharp wave on the screen; null not looked for. */
	readonly sharpWave: 'up' | 'flat' | 'down' | null;
	/** Whether the amplifier shows positive voltages upward, the sign convention of the row. */
	readonly isPositiveUp: boolean;
	/** Ripples, 0 none to 3 strong; null not looked for. */
	readonly ripples: number | null;
}

/**
 * Where the tip stands by its sharp waves: positive above the cell layer, negative below it (the
 * current sink lies in stratum radiatum), flat with clear ripples inside it. Holds against a distant
 * reference; against one in the hippocampus nothing can be said, so give `null` there.
 */
export function landmarkPlace({ sharpWave, isPositiveUp, ripples }: LandmarkSigns): LandmarkPlace {
	if (sharpWave === null) return 'unclear';
	if (sharpWave === 'flat') return (ripples ?? 0) >= 2 ? 'in' : 'unclear';
	return (sharpWave === 'up') === isPositiveUp ? 'above' : 'below';
}
