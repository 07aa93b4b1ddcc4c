/** Bytes of one entry of the table: 1/c and log₂ c, c the middle of a 128th of [1, 2). */
const ENTRY: usize = 16;

/**
 * log₂ of two positive numbers at once, error below 1e-15. Zero gives a finite number, so that
 * 0 · log₂ 0 is 0. Splits x = 2ᵏ · z, c the middle of z's 128th: log₂ x = k + log₂ c + log₂(z/c),
 * the last by its series, |z/c − 1| ≤ 2⁻⁸ (Tang 1990).
 */
export function log2Pair(x: v128, table: usize): v128 {
	const exponent = f64x2.sub(
		v128.or(i64x2.shr_u(x, 52), i64x2.splat(0x4330000000000000)),
		f64x2.splat(4503599627370496.0 + 1023.0)
	);
	const z = v128.or(v128.and(x, i64x2.splat(0x000fffffffffffff)), i64x2.splat(0x3ff0000000000000));
	const c = v128.or(v128.and(z, i64x2.splat(0xffffe00000000000)), i64x2.splat(0x0000100000000000));
	const at = i64x2.shr_u(x, 45);
	const first = v128.load(table + <usize>(i32x4.extract_lane(at, 0) & 127) * ENTRY);
	const second = v128.load(table + <usize>(i32x4.extract_lane(at, 2) & 127) * ENTRY);
	const inverse = v128.shuffle<f64>(first, second, 0, 2);
	const known = v128.shuffle<f64>(first, second, 1, 3);
	const r = f64x2.mul(f64x2.sub(z, c), inverse);
	let series = f64x2.add(f64x2.splat(-0.25), f64x2.mul(r, f64x2.splat(0.2)));
	series = f64x2.add(f64x2.splat(0.3333333333333333), f64x2.mul(r, series));
	series = f64x2.add(f64x2.splat(-0.5), f64x2.mul(r, series));
	series = f64x2.mul(r, f64x2.add(f64x2.splat(1), f64x2.mul(r, series)));
	return f64x2.add(f64x2.add(exponent, known), f64x2.mul(series, f64x2.splat(1.4426950408889634)));
}
