import type { NamedArray } from '$lib/schemas/named-arrays';
import { arrayOf } from './result-parts';

/** Where the animal was at each used spike of a unit. */
export function spikePlaces(
	arrays: Map<string, NamedArray>,
	unit: number
): { xCm: Float32Array; yCm: Float32Array } {
	const first = arrayOf(arrays, 'first');
	const samples = arrayOf(arrays, 'sample').subarray(first[unit], first[unit + 1]);
	const [x, y] = [arrayOf(arrays, 'xCm'), arrayOf(arrays, 'yCm')];
	return {
		xCm: Float32Array.from(samples, (sample) => x[sample]),
		yCm: Float32Array.from(samples, (sample) => y[sample])
	};
}

/** The map of a unit, from the maps of all. */
export function unitMap(arrays: Map<string, NamedArray>, unit: number, bins: number): NamedArray {
	return arrayOf(arrays, 'ratesHz').subarray(unit * bins, (unit + 1) * bins);
}
