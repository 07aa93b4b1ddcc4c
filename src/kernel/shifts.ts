import { log2Pair } from './log2-pair';

/**
 * Counts the spikes of a unit per bin under four shifts at once, side by side: int32 [bin][4].
 * Neighbouring spikes fall into one bin, and a counter just written is slow to read back; four
 * tallies in turn hide that.
 * @param bins  uint16, bin of every cell, twice in a row
 * @param cells int32, twice the cell of each spike (its offset in bytes)
 * @param shifts four int32, cells
 */
function tally(
	bins: usize,
	cells: usize,
	spikes: i32,
	shifts: usize,
	binCount: i32,
	out: usize
): void {
	memory.fill(out, 0, (<usize>binCount) << 4);
	const a = bins + ((<usize>load<i32>(shifts)) << 1);
	const b = bins + ((<usize>load<i32>(shifts, 4)) << 1);
	const c = bins + ((<usize>load<i32>(shifts, 8)) << 1);
	const d = bins + ((<usize>load<i32>(shifts, 12)) << 1);
	const end = cells + ((<usize>spikes) << 2);
	for (let at = cells; at < end; at += 4) {
		const cell = <usize>load<i32>(at);
		const binA = out + ((<usize>load<u16>(a + cell)) << 4);
		store<i32>(binA, load<i32>(binA) + 1);
		const binB = out + ((<usize>load<u16>(b + cell)) << 4);
		store<i32>(binB, load<i32>(binB, 4) + 1, 4);
		const binC = out + ((<usize>load<u16>(c + cell)) << 4);
		store<i32>(binC, load<i32>(binC, 8) + 1, 8);
		const binD = out + ((<usize>load<u16>(d + cell)) << 4);
		store<i32>(binD, load<i32>(binD, 12) + 1, 12);
	}
}

/**
 * Smooths `count` neighbouring vectors (two maps side by side) along one axis.
 * @param middle first of them; its neighbours on the axis lie `step` bytes apart
 * @param half   float64 weights, from the middle outward, `reach` + 1 of them
 */
function spread(middle: usize, step: usize, count: i32, half: usize, reach: i32, out: usize): void {
	const top = v128.load64_splat(half);
	const end = half + ((<usize>reach) << 3);
	let to = out;
	let left = count;
	for (; left >= 4; left -= 4, middle += 64, to += 64) {
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
		v128.store(to, a);
		v128.store(to, b, 16);
		v128.store(to, c, 32);
		v128.store(to, d, 48);
	}
	for (; left > 0; left--, middle += 16, to += 16) {
		let a = f64x2.mul(top, v128.load(middle));
		let low = middle - step;
		let high = middle + step;
		for (let w = half + 8; w <= end; w += 8, low -= step, high += step) {
			const both = f64x2.add(v128.load(low), v128.load(high));
			a = f64x2.add(a, f64x2.mul(v128.load64_splat(w), both));
		}
		v128.store(to, a);
	}
}

/**
 * Smoothed information of a unit's spikes under many shifts.
 * Per shift: Σ p·λ and Σ p·λ·log₂ λ over bins, λ = smoothed count · perSecond, p the share of dwell;
 * bins that do not count have p = 0. Two maps lie side by side in one vector, so every bin is
 * aligned and no edge is special.
 * @param shifts     int32, a multiple of four of them
 * @param half       float64 weights along a row, then (at the same address) along a column
 * @param reachY     0 on a line
 * @param wraps      1 where a row closes on itself
 * @param perSecond  float64 per bin, 0 where a bin does not count
 * @param share      float64 per bin, 0 where a bin does not count
 * @param logTable   table of `log2Pair`
 * @param counts     room: int32 [bin][4]
 * @param row        room: (binsX + 2 reachX) vectors, zero
 * @param rows       room: (binsY + 2 reachY) · binsX vectors, zero
 * @param line       room: binsX vectors
 * @param out        float64 [shift][2]: Σ p·λ and Σ p·λ·log₂ λ
 */
export function smoothedShifts(
	bins: usize,
	cells: usize,
	spikes: i32,
	shifts: usize,
	shiftCount: i32,
	binsX: i32,
	binsY: i32,
	half: usize,
	reachX: i32,
	reachY: i32,
	wraps: i32,
	perSecond: usize,
	share: usize,
	logTable: usize,
	counts: usize,
	row: usize,
	rows: usize,
	line: usize,
	out: usize
): void {
	const width = (<usize>binsX) << 4;
	const pad = (<usize>reachX) << 4;
	for (let s = 0; s < shiftCount; s += 4) {
		tally(bins, cells, spikes, shifts + ((<usize>s) << 2), binsX * binsY, counts);
		for (let pair = 0; pair < 2; pair++) {
			let from = counts + ((<usize>pair) << 3);
			for (let y = 0; y < binsY; y++) {
				let any = i64x2.splat(0);
				for (let x: usize = 0; x < width; x += 16, from += 16) {
					const both = v128.load64_zero(from);
					any = v128.or(any, both);
					v128.store(row + pad + x, f64x2.convert_low_i32x4_s(both));
				}
				const to = rows + <usize>(y + reachY) * width;
				if (!v128.any_true(any)) {
					memory.fill(to, 0, width);
					continue;
				}
				if (wraps) {
					memory.copy(row, row + width, pad);
					memory.copy(row + pad + width, row + pad, pad);
				}
				spread(row + pad, 16, binsX, half, reachX, to);
			}
			let mean = f64x2.splat(0);
			let bits = f64x2.splat(0);
			let bin: usize = 0;
			for (let y = 0; y < binsY; y++) {
				let smoothed = rows + <usize>y * width;
				if (reachY > 0) {
					spread(smoothed + <usize>reachY * width, width, binsX, half, reachY, line);
					smoothed = line;
				}
				for (let x: usize = 0; x < width; x += 16, bin += 8) {
					const rate = f64x2.mul(v128.load(smoothed + x), v128.load64_splat(perSecond + bin));
					const part = f64x2.mul(v128.load64_splat(share + bin), rate);
					mean = f64x2.add(mean, part);
					bits = f64x2.add(bits, f64x2.mul(part, log2Pair(rate, logTable)));
				}
			}
			const at = out + ((<usize>(s + 2 * pair)) << 4);
			v128.store(at, v128.shuffle<f64>(mean, bits, 0, 2));
			v128.store(at, v128.shuffle<f64>(mean, bits, 1, 3), 16);
		}
	}
}

/**
 * Unsmoothed information of a unit's spikes under many shifts: Σ c·log₂ c − Σ c·log₂ p over bins.
 * Counts are whole numbers, so c·log₂ c is read from a table.
 * @param logShare float64 per bin, log₂ of the share of dwell
 * @param table    float64, c·log₂ c for c = 0 … spikes
 * @param out      float64 per shift
 */
export function rawShifts(
	bins: usize,
	cells: usize,
	spikes: i32,
	shifts: usize,
	shiftCount: i32,
	binCount: i32,
	logShare: usize,
	table: usize,
	counts: usize,
	out: usize
): void {
	for (let s = 0; s < shiftCount; s += 4) {
		tally(bins, cells, spikes, shifts + ((<usize>s) << 2), binCount, counts);
		let low = f64x2.splat(0);
		let high = f64x2.splat(0);
		const end = counts + ((<usize>binCount) << 4);
		let log = logShare;
		for (let at = counts; at < end; at += 16, log += 8) {
			const four = v128.load(at);
			if (!v128.any_true(four)) continue;
			const share = v128.load64_splat(log);
			const a = v128.load64_zero(table + ((<usize>i32x4.extract_lane(four, 0)) << 3));
			const ab = v128.load64_lane(table + ((<usize>i32x4.extract_lane(four, 1)) << 3), a, 1);
			const c = v128.load64_zero(table + ((<usize>i32x4.extract_lane(four, 2)) << 3));
			const cd = v128.load64_lane(table + ((<usize>i32x4.extract_lane(four, 3)) << 3), c, 1);
			const top = v128.shuffle<i32>(four, four, 2, 3, 2, 3);
			low = f64x2.add(low, f64x2.sub(ab, f64x2.mul(share, f64x2.convert_low_i32x4_s(four))));
			high = f64x2.add(high, f64x2.sub(cd, f64x2.mul(share, f64x2.convert_low_i32x4_s(top))));
		}
		v128.store(out + ((<usize>s) << 3), low);
		v128.store(out + ((<usize>s) << 3), high, 16);
	}
}
