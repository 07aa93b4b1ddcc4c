/**
 * ln-likelihood of windows over places, without the constants: silent + Σ n · ln f. Sixteen places
 * at a time for all windows, so that their rates stay in fast memory; the sum over the units of a
 * window is the outer one, in the order of its entries.
 * @param first   int32 per window and one more: its first entry
 * @param entries { unit int32, spikes float32 }
 * @param table   float64 [tile][unit][16]: ln of the rates
 * @param silent  float64 [tile][16]: what the sum begins with
 * @param out     float64 [window][16 tiles]
 */
export function evidence(
	first: usize,
	entries: usize,
	windows: i32,
	units: i32,
	tiles: i32,
	table: usize,
	silent: usize,
	out: usize
): void {
	const stride = (<usize>tiles) << 7;
	for (let tile: usize = 0; tile < <usize>tiles; tile++) {
		const rates = table + tile * ((<usize>units) << 7);
		const begin = silent + (tile << 7);
		let to = out + (tile << 7);
		for (let window: usize = 0; window < <usize>windows; window++, to += stride) {
			let entry = entries + ((<usize>load<i32>(first + (window << 2))) << 3);
			const last = entries + ((<usize>load<i32>(first + (window << 2), 4)) << 3);
			let a = v128.load(begin);
			let b = v128.load(begin, 16);
			let c = v128.load(begin, 32);
			let d = v128.load(begin, 48);
			let e = v128.load(begin, 64);
			let f = v128.load(begin, 80);
			let g = v128.load(begin, 96);
			let h = v128.load(begin, 112);
			for (; entry < last; entry += 8) {
				const row = rates + ((<usize>load<i32>(entry)) << 7);
				const spikes = f64x2.splat(load<f32>(entry, 4));
				a = f64x2.add(a, f64x2.mul(spikes, v128.load(row)));
				b = f64x2.add(b, f64x2.mul(spikes, v128.load(row, 16)));
				c = f64x2.add(c, f64x2.mul(spikes, v128.load(row, 32)));
				d = f64x2.add(d, f64x2.mul(spikes, v128.load(row, 48)));
				e = f64x2.add(e, f64x2.mul(spikes, v128.load(row, 64)));
				f = f64x2.add(f, f64x2.mul(spikes, v128.load(row, 80)));
				g = f64x2.add(g, f64x2.mul(spikes, v128.load(row, 96)));
				h = f64x2.add(h, f64x2.mul(spikes, v128.load(row, 112)));
			}
			v128.store(to, a);
			v128.store(to, b, 16);
			v128.store(to, c, 32);
			v128.store(to, d, 48);
			v128.store(to, e, 64);
			v128.store(to, f, 80);
			v128.store(to, g, 96);
			v128.store(to, h, 112);
		}
	}
}
