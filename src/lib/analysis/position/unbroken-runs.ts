/** Samples first … end − 1. */
export interface Run {
	readonly first: number;
	readonly end: number;
}

/**
 * The unbroken runs of a path, in order: neighbouring samples of one stretch that all have a value.
 * @param stretch stretch of each sample, −1 for none
 */
export function unbrokenRuns(values: Float64Array, stretch: Int32Array): Run[] {
	const runs: Run[] = [];
	let first = 0;
	while (first < values.length) {
		if (Number.isNaN(values[first]) || stretch[first] < 0) {
			first++;
			continue;
		}
		let end = first + 1;
		while (end < values.length && stretch[end] === stretch[first] && !Number.isNaN(values[end])) {
			end++;
		}
		runs.push({ first, end });
		first = end;
	}
	return runs;
}
