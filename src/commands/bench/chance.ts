/** Chance for simulated days: numbers in (0, 1), waiting times of mean 1, normal deviates. */
export interface Chance {
	uniform(): number;
	wait(): number;
	normal(): number;
}

/** Seeded generator sfc32 (C. Doty-Humphrey, PractRand), 20 numbers thrown away first. */
export function chance(seed: number): Chance {
	let a = 0x9e3779b9;
	let b = 0x243f6a88;
	let c = 0xb7e15162;
	let counter = seed | 0;
	const next = () => {
		const out = (((a + b) | 0) + counter) | 0;
		counter = (counter + 1) | 0;
		a = b ^ (b >>> 9);
		b = (c + (c << 3)) | 0;
		c = (((c << 21) | (c >>> 11)) + out) | 0;
		return out >>> 0;
	};
	for (let k = 0; k < 20; k++) next();
	const uniform = () => (next() + 0.5) / 2 ** 32;
	return {
		uniform,
		wait: () => -Math.log(uniform()),
		normal: () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform())
	};
}
