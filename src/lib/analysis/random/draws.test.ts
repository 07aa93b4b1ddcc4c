import { expect, it } from 'vitest';
import { binomialLogPmf } from '../statistics/binomial';
import { normalCdf } from '../statistics/normal';
import { drawBinomial } from './binomial-draw';
import { drawNormal } from './normal-draw';
import { seeded } from './seeded';

it('draws normal numbers whose distribution function is the normal one', () => {
	const random = seeded(12);
	const draws = Float64Array.from({ length: 20_000 }, () => drawNormal(random)).sort();
	// Kolmogorov's 0.1 % point is 1.95/√n = 0.014.
	const worst = draws.reduce((w, z, i) => Math.max(w, Math.abs(normalCdf(z) - i / 20_000)), 0);
	expect(worst).toBeLessThan(0.014);
});

it('draws binomial counts with the chances of the distribution, the certain ones too', () => {
	const random = seeded(13);
	for (const [trials, chance] of [
		[5, 0.3],
		[6, 0.8],
		[700, 0.02]
	]) {
		const seen = new Float64Array(trials + 1);
		for (let i = 0; i < 20_000; i++) seen[drawBinomial(trials, chance, random)]++;
		seen.forEach((n, k) => {
			const p = Math.exp(binomialLogPmf(k, trials, chance));
			expect(Math.abs(n - 20_000 * p)).toBeLessThan(4.5 * Math.sqrt(20_000 * p * (1 - p)) + 1);
		});
	}
	expect([drawBinomial(7, 0, random), drawBinomial(7, 1, random)]).toEqual([0, 7]);
	expect(drawBinomial(0, 0.5, random)).toBe(0);
});
