import { describe, expect, it } from 'vitest';
import { drawPoisson } from './poisson-draw';
import { seeded } from './seeded';

describe('drawPoisson', () => {
	it.each([0.3, 4, 75])('has the mean and variance %s (closed form)', (mean) => {
		const random = seeded(3, String(mean));
		const draws = 20_000;
		let sum = 0;
		let squares = 0;
		for (let i = 0; i < draws; i++) {
			const n = drawPoisson(mean, random);
			sum += n;
			squares += n * n;
		}
		const found = sum / draws;
		// Five standard errors of a mean of 20 000 draws, and of a variance (μ + 2μ² over draws).
		expect(Math.abs(found - mean)).toBeLessThan(5 * Math.sqrt(mean / draws));
		const variance = squares / draws - found * found;
		expect(Math.abs(variance - mean)).toBeLessThan(5 * Math.sqrt((mean + 2 * mean ** 2) / draws));
	});

	it('gives zero for a mean of zero and refuses what is no mean', () => {
		expect(drawPoisson(0, seeded(1))).toBe(0);
		for (const mean of [-1, NaN, Infinity]) {
			expect(() => drawPoisson(mean, seeded(1))).toThrow(RangeError);
		}
	});
});
