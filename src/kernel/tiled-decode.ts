import { expFour } from './exp-four';

/** Bytes kept of a window while its tiles are added: three vectors of sums, best value, its bin. */
const STATE: usize = 64;
const BEST: usize = 48;
const BIN: usize = 52;
/** Tiles whose bound lies this far below the best place are left out: e⁻²⁰ = 2e-9 each. */
const NEGLIGIBLE: f32 = 20;

/** Largest of four lanes, in all of them. */
function topLane(given: v128): v128 {
	const top = f32x4.max(given, v128.shuffle<i32>(given, given, 2, 3, 0, 1));
	return f32x4.max(top, v128.shuffle<i32>(top, top, 1, 0, 3, 2));
}

/**
 * Adds one tile of sixteen places to some windows.
 * @param table     float32 [unit][16] of this tile
 * @param constants float32 [16]: what the sum begins with; −1e30 for places that cannot be answered
 * @param list      int32, windows of the block
 */
function addTile(
	first: usize,
	entries: usize,
	table: usize,
	constants: usize,
	xCm: usize,
	yCm: usize,
	binOf: usize,
	states: usize,
	list: usize,
	count: i32
): void {
	const end = list + ((<usize>count) << 2);
	for (let item = list; item < end; item += 4) {
		const window = <usize>load<i32>(item);
		let entry = entries + ((<usize>load<i32>(first + (window << 2))) << 3);
		const last = entries + ((<usize>load<i32>(first + (window << 2), 4)) << 3);
		let a = v128.load(constants);
		let b = v128.load(constants, 16);
		let c = v128.load(constants, 32);
		let d = v128.load(constants, 48);
		for (; entry < last; entry += 8) {
			const row = table + ((<usize>load<i32>(entry)) << 6);
			const spikes = v128.load32_splat(entry, 4);
			a = f32x4.add(a, f32x4.mul(spikes, v128.load(row)));
			b = f32x4.add(b, f32x4.mul(spikes, v128.load(row, 16)));
			c = f32x4.add(c, f32x4.mul(spikes, v128.load(row, 32)));
			d = f32x4.add(d, f32x4.mul(spikes, v128.load(row, 48)));
		}
		const top = topLane(f32x4.max(f32x4.max(a, b), f32x4.max(c, d)));
		const value = f32x4.extract_lane(top, 0);
		const state = states + window * STATE;
		let sum = v128.load(state);
		let sumX = v128.load(state, 16);
		let sumY = v128.load(state, 32);
		let best = load<f32>(state, BEST);
		if (value >= best) {
			const isTop =
				i32x4.bitmask(f32x4.eq(a, top)) |
				(i32x4.bitmask(f32x4.eq(b, top)) << 4) |
				(i32x4.bitmask(f32x4.eq(c, top)) << 8) |
				(i32x4.bitmask(f32x4.eq(d, top)) << 12);
			const bin = load<i32>(binOf + ((<usize>ctz(isTop)) << 2));
			if (value > best || bin < load<i32>(state, BIN)) store<i32>(state, bin, BIN);
			const scale = expFour(f32x4.splat(best - value));
			sum = f32x4.mul(sum, scale);
			sumX = f32x4.mul(sumX, scale);
			sumY = f32x4.mul(sumY, scale);
			best = value;
			store<f32>(state, best, BEST);
		}
		const reference = f32x4.splat(best);
		a = expFour(f32x4.sub(a, reference));
		b = expFour(f32x4.sub(b, reference));
		c = expFour(f32x4.sub(c, reference));
		d = expFour(f32x4.sub(d, reference));
		sum = f32x4.add(sum, f32x4.add(f32x4.add(a, b), f32x4.add(c, d)));
		sumX = f32x4.add(sumX, f32x4.mul(a, v128.load(xCm)));
		sumX = f32x4.add(sumX, f32x4.mul(b, v128.load(xCm, 16)));
		sumX = f32x4.add(sumX, f32x4.mul(c, v128.load(xCm, 32)));
		sumX = f32x4.add(sumX, f32x4.mul(d, v128.load(xCm, 48)));
		sumY = f32x4.add(sumY, f32x4.mul(a, v128.load(yCm)));
		sumY = f32x4.add(sumY, f32x4.mul(b, v128.load(yCm, 16)));
		sumY = f32x4.add(sumY, f32x4.mul(c, v128.load(yCm, 32)));
		sumY = f32x4.add(sumY, f32x4.mul(d, v128.load(yCm, 48)));
		v128.store(state, sum);
		v128.store(state, sumX, 16);
		v128.store(state, sumY, 32);
	}
}

function laneSum(four: v128): f32 {
	const low = f32x4.extract_lane(four, 0) + f32x4.extract_lane(four, 1);
	return low + (f32x4.extract_lane(four, 2) + f32x4.extract_lane(four, 3));
}

/**
 * Decodes a block of windows: ln p = constant + Σ n · ln f over tiles of sixteen places. Every
 * window first gets a bound of each tile, from the largest log rates in it; its best tile is
 * added, and then those whose bound comes near the best place found. Tile after tile, so that the
 * rates of a tile stay in the fastest memory.
 * @param first     int32 per window and one more: its first entry
 * @param entries   { unit int32, spikes float32 }
 * @param windows   windows of the block
 * @param groups    groups of sixteen tiles; the last may be padded with constants of −1e30
 * @param bounds    of `tileBounds`
 * @param tops      float32 per tile: largest constant
 * @param binOf     int32 [tile][16]
 * @param scores    room: float32 [window][16 groups]
 * @param lists     room: int32 [tile][window]
 * @param lengths   room: int32 [tile]
 * @param states    room: 64 bytes a window
 * @param bins      int32 per window, gets the best bin, the lowest in a tie
 * @param means     float32 [window][2], gets the posterior mean
 */
export function tiledDecode(
	first: usize,
	entries: usize,
	windows: i32,
	units: i32,
	groups: i32,
	table: usize,
	constants: usize,
	bounds: usize,
	tops: usize,
	xCm: usize,
	yCm: usize,
	binOf: usize,
	scores: usize,
	lists: usize,
	lengths: usize,
	states: usize,
	bins: usize,
	means: usize
): void {
	const tiles = groups << 4;
	const scoreRow = (<usize>tiles) << 2;
	const listRow = (<usize>windows) << 2;
	const tileTable = (<usize>units) << 6;
	for (let group = 0; group < groups; group++) {
		const rates = bounds + <usize>group * tileTable;
		const top = tops + ((<usize>group) << 6);
		let to = scores + ((<usize>group) << 6);
		for (let window: usize = 0; window < <usize>windows; window++, to += scoreRow) {
			let entry = entries + ((<usize>load<i32>(first + (window << 2))) << 3);
			const last = entries + ((<usize>load<i32>(first + (window << 2), 4)) << 3);
			let a = v128.load(top);
			let b = v128.load(top, 16);
			let c = v128.load(top, 32);
			let d = v128.load(top, 48);
			for (; entry < last; entry += 8) {
				const row = rates + ((<usize>load<i32>(entry)) << 6);
				const spikes = v128.load32_splat(entry, 4);
				a = f32x4.add(a, f32x4.mul(spikes, v128.load(row)));
				b = f32x4.add(b, f32x4.mul(spikes, v128.load(row, 16)));
				c = f32x4.add(c, f32x4.mul(spikes, v128.load(row, 32)));
				d = f32x4.add(d, f32x4.mul(spikes, v128.load(row, 48)));
			}
			v128.store(to, a);
			v128.store(to, b, 16);
			v128.store(to, c, 32);
			v128.store(to, d, 48);
		}
	}
	memory.fill(lengths, 0, (<usize>tiles) << 2);
	for (let window: usize = 0; window < <usize>windows; window++) {
		const row = scores + window * scoreRow;
		let top = v128.load(row);
		for (let at: usize = 16; at < scoreRow; at += 16) top = f32x4.max(top, v128.load(row + at));
		top = topLane(top);
		let at: usize = 0;
		let isTop = 0;
		for (; at < scoreRow; at += 16) {
			isTop = i32x4.bitmask(f32x4.eq(v128.load(row + at), top));
			if (isTop) break;
		}
		const tile = (at >> 2) + <usize>ctz(isTop);
		// The tile is taken now; it must not come again.
		store<f32>(row + (tile << 2), -f32.MAX_VALUE);
		const state = states + window * STATE;
		memory.fill(state, 0, STATE);
		store<f32>(state, -f32.MAX_VALUE, BEST);
		const length = load<i32>(lengths + (tile << 2));
		store<i32>(lists + tile * listRow + ((<usize>length) << 2), <i32>window);
		store<i32>(lengths + (tile << 2), length + 1);
	}
	for (let pass = 0; pass < 2; pass++) {
		for (let tile: usize = 0; tile < <usize>tiles; tile++) {
			const count = load<i32>(lengths + (tile << 2));
			if (count === 0) continue;
			const places = tile << 6;
			addTile(
				first,
				entries,
				table + tile * tileTable,
				constants + places,
				xCm + places,
				yCm + places,
				binOf + places,
				states,
				lists + tile * listRow,
				count
			);
		}
		if (pass === 1) break;
		memory.fill(lengths, 0, (<usize>tiles) << 2);
		for (let window: usize = 0; window < <usize>windows; window++) {
			const row = scores + window * scoreRow;
			const least = f32x4.splat(load<f32>(states + window * STATE, BEST) - NEGLIGIBLE);
			for (let at: usize = 0; at < scoreRow; at += 16) {
				let near = i32x4.bitmask(f32x4.ge(v128.load(row + at), least));
				while (near) {
					const tile = (at >> 2) + <usize>ctz(near);
					near &= near - 1;
					const length = load<i32>(lengths + (tile << 2));
					store<i32>(lists + tile * listRow + ((<usize>length) << 2), <i32>window);
					store<i32>(lengths + (tile << 2), length + 1);
				}
			}
		}
	}
	for (let window: usize = 0; window < <usize>windows; window++) {
		const state = states + window * STATE;
		const sum = laneSum(v128.load(state));
		store<i32>(bins + (window << 2), load<i32>(state, BIN));
		store<f32>(means + (window << 3), laneSum(v128.load(state, 16)) / sum);
		store<f32>(means + (window << 3), laneSum(v128.load(state, 32)) / sum, 4);
	}
}
