/**
 * ln of four positive normal numbers, single precision, error 1e-7 of it.
 * Polynomial of S. Moshier's Cephes library (logf).
 */
export function logFour(x: v128): v128 {
	const half = v128.or(v128.and(x, i32x4.splat(0x007fffff)), i32x4.splat(0x3f000000));
	const isLow = f32x4.lt(half, f32x4.splat(0.707106781186547524));
	const power = i32x4.sub(i32x4.shr_u(x, 23), i32x4.splat(126));
	// A mask that holds counts as −1.
	const e = f32x4.convert_i32x4_s(i32x4.add(power, isLow));
	const m = f32x4.sub(f32x4.add(half, v128.and(half, isLow)), f32x4.splat(1));
	const z = f32x4.mul(m, m);
	let y = f32x4.add(f32x4.mul(f32x4.splat(7.0376836292e-2), m), f32x4.splat(-1.151461031e-1));
	y = f32x4.add(f32x4.mul(y, m), f32x4.splat(1.167699874e-1));
	y = f32x4.add(f32x4.mul(y, m), f32x4.splat(-1.2420140846e-1));
	y = f32x4.add(f32x4.mul(y, m), f32x4.splat(1.4249322787e-1));
	y = f32x4.add(f32x4.mul(y, m), f32x4.splat(-1.6668057665e-1));
	y = f32x4.add(f32x4.mul(y, m), f32x4.splat(2.0000714765e-1));
	y = f32x4.add(f32x4.mul(y, m), f32x4.splat(-2.4999993993e-1));
	y = f32x4.add(f32x4.mul(y, m), f32x4.splat(3.3333331174e-1));
	y = f32x4.mul(f32x4.mul(y, m), z);
	y = f32x4.add(y, f32x4.mul(e, f32x4.splat(-2.1219444e-4)));
	y = f32x4.sub(y, f32x4.mul(z, f32x4.splat(0.5)));
	return f32x4.add(f32x4.add(m, y), f32x4.mul(e, f32x4.splat(0.693359375)));
}
