/**
 * Nodes and weights of Gauss–Legendre quadrature on [from, to], ascending.
 * Newton's iteration on the Legendre polynomial from Chebyshev's points; weights 2/((1 − x²)p′²).
 * @param n nodes, ≥ 1
 * @throws RangeError n not a whole number above 0
 * Cost: O(n²).
 */
export function gaussLegendre(
	n: number,
	from: number,
	to: number
): { readonly x: Float64Array; readonly weight: Float64Array } {
	if (!(Number.isInteger(n) && n >= 1)) throw new RangeError(`nodes must be a whole number: ${n}`);
	const x = new Float64Array(n);
	const weight = new Float64Array(n);
	const half = (to - from) / 2;
	for (let i = 0; i < n; i++) {
		let at = -Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
		let slope = 0;
		// Quadratic convergence: five steps suffice from these starts, eight leave room.
		for (let step = 0; step < 8; step++) {
			let value = 1;
			let before = 0;
			for (let k = 1; k <= n; k++) {
				const next = ((2 * k - 1) * at * value - (k - 1) * before) / k;
				before = value;
				value = next;
			}
			slope = (n * (at * value - before)) / (at * at - 1);
			at -= value / slope;
		}
		x[i] = from + half * (1 + at);
		weight[i] = (2 * half) / ((1 - at * at) * slope * slope);
	}
	return { x, weight };
}
