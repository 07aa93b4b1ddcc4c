/**
 * eˣ of four numbers at most 0, single precision, relative error 2e-7; below −87 it stays at e⁻⁸⁷.
 * x = n·ln 2 + r, |r| ≤ ln 2 / 2; polynomial of S. Moshier's Cephes library (expf).
 */
export function expFour(given: v128): v128 {
	const x = f32x4.max(given, f32x4.splat(-87));
	// Adding 1.5 · 2²³ rounds to whole numbers and leaves them in the lowest bits.
	const shifted = f32x4.add(f32x4.mul(x, f32x4.splat(1.44269504088896341)), f32x4.splat(12582912));
	const n = f32x4.sub(shifted, f32x4.splat(12582912));
	let r = f32x4.sub(x, f32x4.mul(n, f32x4.splat(0.693359375)));
	r = f32x4.add(r, f32x4.mul(n, f32x4.splat(2.1219444e-4)));
	let y = f32x4.add(f32x4.mul(f32x4.splat(1.98756915e-4), r), f32x4.splat(1.3981999507e-3));
	y = f32x4.add(f32x4.mul(y, r), f32x4.splat(8.3334519073e-3));
	y = f32x4.add(f32x4.mul(y, r), f32x4.splat(4.1665795894e-2));
	y = f32x4.add(f32x4.mul(y, r), f32x4.splat(1.6666665459e-1));
	y = f32x4.add(f32x4.mul(y, r), f32x4.splat(5.0000001201e-1));
	y = f32x4.add(f32x4.add(f32x4.mul(y, f32x4.mul(r, r)), r), f32x4.splat(1));
	return f32x4.mul(y, i32x4.shl(i32x4.add(shifted, i32x4.splat(127)), 23));
}
