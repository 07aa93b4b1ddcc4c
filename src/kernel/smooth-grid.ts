/** Columns smoothed together; rows are padded to whole eights. */
const EIGHT = 64;

/** Smooths `width` bytes of numbers along one axis; neighbours on it lie `step` bytes apart. */
function spreadEights(
	from: usize,
	step: usize,
	width: usize,
	half: usize,
	reach: i32,
	out: usize
): void {
	const top = v128.load64_splat(half);
	const end = half + ((<usize>reach) << 3);
	for (let x: usize = 0; x < width; x += EIGHT) {
		const middle = from + x;
		let a = f64x2.mul(top, v128.load(middle));
		let b = f64x2.mul(top, v128.load(middle, 16));
		let c = f64x2.mul(top, v128.load(middle, 32));
		let d = f64x2.mul(top, v128.load(middle, 48));
		let low = middle - step;
		let high = middle + step;
		for (let w = half + 8; w <= end; w += 8, low -= step, high += step) {
			const weight = v128.load64_splat(w);
			a = f64x2.add(a, f64x2.mul(weight, f64x2.add(v128.load(low), v128.load(high))));
			b = f64x2.add(b, f64x2.mul(weight, f64x2.add(v128.load(low, 16), v128.load(high, 16))));
			c = f64x2.add(c, f64x2.mul(weight, f64x2.add(v128.load(low, 32), v128.load(high, 32))));
			d = f64x2.add(d, f64x2.mul(weight, f64x2.add(v128.load(low, 48), v128.load(high, 48))));
		}
		const to = out + x;
		v128.store(to, a);
		v128.store(to, b, 16);
		v128.store(to, c, 32);
		v128.store(to, d, 48);
	}
}

/**
 * Smooths the rows and then the columns of a row-major grid in place, nothing beyond the edges.
 * @param grid float64
 * @param half float64 weights from the middle outward
 * @param row  room: 2 reach numbers and a row filled up to eights
 * @param rows room: binsY + 2 reach rows filled up to eights
 * @param line room: a row filled up to eights
 */
export function smoothGrid(
	grid: usize,
	binsX: i32,
	binsY: i32,
	half: usize,
	reach: i32,
	row: usize,
	rows: usize,
	line: usize
): void {
	const used = (<usize>binsX) << 3;
	const width = (used + EIGHT - 1) & ~(EIGHT - 1);
	const pad = (<usize>reach) << 3;
	memory.fill(row, 0, width + 2 * pad);
	memory.fill(rows, 0, <usize>reach * width);
	memory.fill(rows + <usize>(binsY + reach) * width, 0, <usize>reach * width);
	for (let y = 0; y < binsY; y++) {
		memory.copy(row + pad, grid + <usize>y * used, used);
		spreadEights(row + pad, 8, width, half, reach, rows + <usize>(y + reach) * width);
	}
	for (let y = 0; y < binsY; y++) {
		spreadEights(rows + <usize>(y + reach) * width, width, width, half, reach, line);
		memory.copy(grid + <usize>y * used, line, used);
	}
}
