/** Smooths `count` neighbouring vectors (four maps side by side) along one axis; see `spread`. */
function spreadFour(
	from: usize,
	step: usize,
	count: i32,
	half: usize,
	reach: i32,
	out: usize
): void {
	const top = v128.load32_splat(half);
	const end = half + ((<usize>reach) << 2);
	let middle = from;
	let to = out;
	let left = count;
	for (; left >= 4; left -= 4, middle += 64, to += 64) {
		let a = f32x4.mul(top, v128.load(middle));
		let b = f32x4.mul(top, v128.load(middle, 16));
		let c = f32x4.mul(top, v128.load(middle, 32));
		let d = f32x4.mul(top, v128.load(middle, 48));
		let low = middle - step;
		let high = middle + step;
		for (let w = half + 4; w <= end; w += 4, low -= step, high += step) {
			const weight = v128.load32_splat(w);
			a = f32x4.add(a, f32x4.mul(weight, f32x4.add(v128.load(low), v128.load(high))));
			b = f32x4.add(b, f32x4.mul(weight, f32x4.add(v128.load(low, 16), v128.load(high, 16))));
			c = f32x4.add(c, f32x4.mul(weight, f32x4.add(v128.load(low, 32), v128.load(high, 32))));
			d = f32x4.add(d, f32x4.mul(weight, f32x4.add(v128.load(low, 48), v128.load(high, 48))));
		}
		v128.store(to, a);
		v128.store(to, b, 16);
		v128.store(to, c, 32);
		v128.store(to, d, 48);
	}
	for (; left > 0; left--, middle += 16, to += 16) {
		let a = f32x4.mul(top, v128.load(middle));
		let low = middle - step;
		let high = middle + step;
		for (let w = half + 4; w <= end; w += 4, low -= step, high += step) {
			const both = f32x4.add(v128.load(low), v128.load(high));
			a = f32x4.add(a, f32x4.mul(v128.load32_splat(w), both));
		}
		v128.store(to, a);
	}
}

/**
 * Smooths the counts of four units along rows and columns, nothing beyond the edges.
 * @param all   int32, four counts of the first bin; those of the next lie `stride` bytes further
 * @param own   the same, taken off `all` first; 0 for none
 * @param half  float32 weights from the middle outward
 * @param reachY 0 on a line
 * @param row   room: (binsX + 2 reachX) vectors, zero at both ends
 * @param rows  room: (binsY + 2 reachY) · binsX vectors, zero above and below
 * @param out   float32 [bin][4]
 */
export function smoothFour(
	all: usize,
	own: usize,
	stride: usize,
	binsX: i32,
	binsY: i32,
	half: usize,
	reachX: i32,
	reachY: i32,
	row: usize,
	rows: usize,
	out: usize
): void {
	const width = (<usize>binsX) << 4;
	const middle = row + ((<usize>reachX) << 4);
	let bin: usize = 0;
	for (let y = 0; y < binsY; y++) {
		for (let x: usize = 0; x < width; x += 16, bin += stride) {
			let counts = v128.load(all + bin);
			if (own) counts = i32x4.sub(counts, v128.load(own + bin));
			v128.store(middle + x, f32x4.convert_i32x4_s(counts));
		}
		const to = reachY > 0 ? rows + <usize>(y + reachY) * width : out;
		spreadFour(middle, 16, binsX, half, reachX, to);
	}
	if (reachY === 0) return;
	for (let y = 0; y < binsY; y++) {
		const from = rows + <usize>(y + reachY) * width;
		spreadFour(from, width, binsX, half, reachY, out + <usize>y * width);
	}
}
