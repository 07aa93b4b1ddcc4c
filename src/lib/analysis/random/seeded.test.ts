import { describe, expect, it } from 'vitest';
import { pearson } from '../statistics/pearson';
import { seeded } from './seeded';

const SEEDS = 2000;

describe('seeded', () => {
	it('gives the same numbers for the same seed and purpose, others for another', () => {
		const first = (seed: number, purpose: string) => {
			const random = seeded(seed, purpose);
			return [random.next(), random.below(1_000_000), random.next()];
		};
		expect(first(7, 'shift')).toEqual(first(7, 'shift'));
		expect(first(7, 'shift')).not.toEqual(first(8, 'shift'));
		expect(first(7, 'shift')).not.toEqual(first(7, 'subset'));
	});

	it.each([
		['seed', (k: number) => seeded(k)],
		['purpose', (k: number) => seeded(1, `unit ${k}`)]
	])('begins unlike for a neighbouring %s', (_, generator) => {
		const firsts = Float64Array.from({ length: SEEDS }, (_, k) => generator(k).next());
		// Uniform on [0, 1): mean ½, variance 1/12; four standard errors.
		const mean = firsts.reduce((sum, value) => sum + value, 0) / SEEDS;
		expect(Math.abs(mean - 0.5)).toBeLessThan(4 / Math.sqrt(12 * SEEDS));
		// Ten equal parts: χ² of 9 degrees of freedom is below 27.9 in 999 of 1000 cases.
		const parts = new Int32Array(10);
		for (const value of firsts) parts[Math.floor(10 * value)]++;
		const expected = SEEDS / 10;
		const chi = parts.reduce((sum, count) => sum + (count - expected) ** 2 / expected, 0);
		expect(chi).toBeLessThan(27.9);
		const next = pearson(firsts.subarray(0, -1), firsts.subarray(1));
		expect(Math.abs(next)).toBeLessThan(4 / Math.sqrt(SEEDS));
	});
});
