import { smoothFour } from './four-maps';
import { logFour } from './log-four';

/**
 * Log rates of all units from training counts, laid out for `tiledDecode`.
 * @param all, own  int32 [bin][unit]: counts of all time and of the fold's own
 * @param units     a multiple of four
 * @param perSecond float32 per bin: 1/smoothed seconds, 0 where nobody trained
 * @param leastHz   rates are floored here
 * @param slot      int32 per bin: offset in `table` of the bin's place, unit 0
 * @param map       room: float32 [bin][4]
 * @param table     float32 [tile][unit][16]: ln of the rates, Hz
 * @param totalHz   float64 per bin, gets the sum over units
 */
export function tileRates(
	all: usize,
	own: usize,
	unitCount: i32,
	binsX: i32,
	binsY: i32,
	half: usize,
	reachX: i32,
	reachY: i32,
	perSecond: usize,
	leastHz: f32,
	slot: usize,
	row: usize,
	rows: usize,
	map: usize,
	table: usize,
	totalHz: usize
): void {
	const bins = <usize>(binsX * binsY);
	memory.fill(totalHz, 0, bins << 3);
	const least = f32x4.splat(leastHz);
	const stride = (<usize>unitCount) << 2;
	for (let group = 0; group < unitCount >> 2; group++) {
		const at = (<usize>group) << 4;
		smoothFour(all + at, own + at, stride, binsX, binsY, half, reachX, reachY, row, rows, map);
		const units = table + ((<usize>group) << 8);
		for (let bin: usize = 0; bin < bins; bin++) {
			const seconds = v128.load32_splat(perSecond + (bin << 2));
			const rate = f32x4.max(f32x4.mul(v128.load(map + (bin << 4)), seconds), least);
			const total = totalHz + (bin << 3);
			const high = v128.shuffle<i32>(rate, rate, 2, 3, 2, 3);
			const pairs = f64x2.add(f64x2.promote_low_f32x4(rate), f64x2.promote_low_f32x4(high));
			const sum = f64x2.extract_lane(pairs, 0) + f64x2.extract_lane(pairs, 1);
			store<f64>(total, load<f64>(total) + sum);
			const log = logFour(rate);
			const to = units + <usize>load<i32>(slot + (bin << 2));
			v128.store32_lane(to, log, 0);
			v128.store32_lane(to, log, 1, 64);
			v128.store32_lane(to, log, 2, 128);
			v128.store32_lane(to, log, 3, 192);
		}
	}
}

/**
 * Largest log rate of every unit in every tile.
 * @param table  of `tileRates`
 * @param bounds float32 [16 tiles][unit][16]
 */
export function tileBounds(table: usize, tiles: i32, units: i32, bounds: usize): void {
	let from = table;
	for (let tile = 0; tile < tiles; tile++) {
		let to = bounds + ((<usize>(tile >> 4) * <usize>units) << 6) + ((<usize>(tile & 15)) << 2);
		for (let unit = 0; unit < units; unit++, from += 64, to += 64) {
			let top = f32x4.max(
				f32x4.max(v128.load(from), v128.load(from, 16)),
				f32x4.max(v128.load(from, 32), v128.load(from, 48))
			);
			top = f32x4.max(top, v128.shuffle<i32>(top, top, 2, 3, 0, 1));
			top = f32x4.max(top, v128.shuffle<i32>(top, top, 1, 0, 3, 2));
			store<f32>(to, f32x4.extract_lane(top, 0));
		}
	}
}
