/**
 * Cuts the stretches of a session into blocks of equal length on the clock, counted from the first
 * sample of each stretch; a block never spans two stretches.
 * @returns block of each sample, −1 outside every stretch, and how many there are
 */
export function timeBlocks(
	tS: Float64Array,
	stretch: Int32Array,
	lengthS: number
): { count: number; ofSample: Int32Array } {
	const ofSample = new Int32Array(tS.length).fill(-1);
	let block = -1;
	let endS = -Infinity;
	let inside = -1;
	for (let i = 0; i < tS.length; i++) {
		if (stretch[i] < 0) continue;
		if (stretch[i] !== inside) {
			inside = stretch[i];
			block++;
			endS = tS[i] + lengthS;
		}
		if (tS[i] >= endS) {
			block++;
			while (tS[i] >= endS) endS += lengthS;
		}
		ofSample[i] = block;
	}
	return { count: block + 1, ofSample };
}
