/** Tracker samples per second. */
export const SAMPLE_HZ = 30;

/** A run as it truly went, before any tracker's noise. Origin: end A, or the lower left corner. */
export interface TruePath {
	readonly tS: Float64Array;
	readonly xCm: Float64Array;
	readonly yCm: Float64Array;
	/** +1 running towards larger x, −1 back, 0 standing or where direction has no meaning. */
	readonly heading: Int8Array;
}

export function emptyPath(durationS: number): TruePath {
	const count = Math.floor(durationS * SAMPLE_HZ);
	return {
		tS: Float64Array.from({ length: count }, (_, i) => i / SAMPLE_HZ),
		xCm: new Float64Array(count),
		yCm: new Float64Array(count),
		heading: new Int8Array(count)
	};
}
