/** Room for a matrix of cells; coarser cells serve a larger arena. */
const MOST_CELLS = 2048;

/**
 * Where the decoder answers, by where the animal is: row = true cell, column = decoded cell, each
 * row the shares of its windows.
 * @param trueCell    cell of each window: a bin, or a coarser stretch of the arena; −1 is left out
 * @param decodedCell answer of each window; −1 is left out
 * @param cells       number of cells
 * @returns row-major [true][decoded]; rows sum to one, rows of cells never visited are NaN
 * @throws RangeError lengths differ, or more than 2048 cells
 * Cost: O(windows + cells²).
 */
export function decodedAgainstTrue(
	trueCell: Int32Array,
	decodedCell: Int32Array,
	cells: number
): Float64Array {
	if (trueCell.length !== decodedCell.length) {
		throw new RangeError(`lengths differ: ${trueCell.length} and ${decodedCell.length}`);
	}
	if (!(cells <= MOST_CELLS)) throw new RangeError(`${cells} cells are more than ${MOST_CELLS}`);
	const out = new Float64Array(cells * cells);
	const visits = new Float64Array(cells);
	for (let w = 0; w < trueCell.length; w++) {
		if (trueCell[w] < 0 || decodedCell[w] < 0) continue;
		out[trueCell[w] * cells + decodedCell[w]]++;
		visits[trueCell[w]]++;
	}
	// 0/0 is NaN, as it should be.
	for (let i = 0; i < out.length; i++) out[i] /= visits[Math.floor(i / cells)];
	return out;
}
