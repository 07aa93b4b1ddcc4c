const PARTS = 128;

/** Middles c of the 128 parts of [1, 2), each as 1/c and log₂ c: what the kernel's logarithm reads. */
export function logTable(): Float64Array {
	return Float64Array.from({ length: 2 * PARTS }, (_, k) => {
		const middle = 1 + (Math.floor(k / 2) + 0.5) / PARTS;
		return k % 2 === 0 ? 1 / middle : Math.log2(middle);
	});
}
