import type { Ramp } from './ramp';

interface Grid {
	/** Row-major values, first row at the bottom; NaN and null are undefined places. */
	values: ArrayLike<number | null>;
	columns: number;
	rows: number;
	/** Value drawn in the ramp's last colour; what lies above is drawn the same. */
	most: number;
}

/**
 * RGBA of a grid, one pixel a cell, first row of pixels at the top as a canvas
 * wants it. Undefined places stay transparent: nothing is drawn where there are no data.
 */
export function mapPixels({ values, columns, rows, most }: Grid, ramp: Ramp) {
	if (values.length !== columns * rows) {
		throw new RangeError(`A grid of ${columns} × ${rows} cannot hold ${values.length} values.`);
	}
	const pixels = new Uint8ClampedArray(columns * rows * 4);
	for (let row = 0; row < rows; row++) {
		for (let column = 0; column < columns; column++) {
			const value = values[row * columns + column];
			if (value === null || Number.isNaN(value)) continue;
			const share = most > 0 ? Math.min(1, Math.max(0, value / most)) : 0;
			const colour = Math.round(share * 255) * 3;
			const to = ((rows - 1 - row) * columns + column) * 4;
			pixels[to] = ramp[colour];
			pixels[to + 1] = ramp[colour + 1];
			pixels[to + 2] = ramp[colour + 2];
			pixels[to + 3] = 255;
		}
	}
	return pixels;
}

/** Windows as columns and bins as rows: a posterior is stored window after window. */
export function transposed(values: ArrayLike<number>, windows: number, bins: number): Float32Array {
	const turned = new Float32Array(windows * bins);
	for (let w = 0; w < windows; w++) {
		for (let b = 0; b < bins; b++) turned[b * windows + w] = values[w * bins + b];
	}
	return turned;
}

/** The largest defined value, or 0. */
export function largest(values: ArrayLike<number | null>): number {
	let most = 0;
	for (let i = 0; i < values.length; i++) {
		const value = values[i];
		if (value !== null && value > most) most = value;
	}
	return most;
}
