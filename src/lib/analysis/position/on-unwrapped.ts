import { mod, unwrapRing } from '../arena/ring';

/**
 * Does work on a ring that knows nothing of its seam: hands it the distance run with laps added up
 * and puts the answer back on the ring, in [0, lengthCm).
 * @param xCm  distance along the ring, NaN where unknown
 * @param work gets a new array of the same length and returns one
 */
export function onUnwrapped(
	xCm: Float64Array,
	lengthCm: number,
	work: (runCm: Float64Array) => Float64Array
): Float64Array {
	return work(unwrapRing(xCm, lengthCm)).map((value) => mod(value, lengthCm));
}
