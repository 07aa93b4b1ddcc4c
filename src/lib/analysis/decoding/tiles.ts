/** Places in one tile. */
export const TILE = 16;

/** A grid cut into tiles of sixteen neighbouring bins: 4 × 4, on a line 16 × 1. */
export interface Tiles {
	readonly count: number;
	/** Groups of sixteen tiles. */
	readonly groups: number;
	/** Bin of every place, [tile][16], −1 beyond the grid; padded to whole groups. */
	readonly bin: Int32Array;
}

/** Cuts a grid of bins (row-major) into tiles; within a tile bins ascend. */
export function tilesOf(binsX: number, binsY: number): Tiles {
	const [wide, high] = binsY > 1 ? [4, 4] : [16, 1];
	const across = Math.ceil(binsX / wide);
	const count = across * Math.ceil(binsY / high);
	const groups = Math.ceil(count / TILE);
	const bin = new Int32Array(groups * TILE * TILE).fill(-1);
	for (let y = 0; y < binsY; y++) {
		for (let x = 0; x < binsX; x++) {
			const tile = Math.floor(y / high) * across + Math.floor(x / wide);
			bin[tile * TILE + (y % high) * wide + (x % wide)] = y * binsX + x;
		}
	}
	return { count, groups, bin };
}
