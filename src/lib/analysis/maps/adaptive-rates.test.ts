import { describe, expect, it } from 'vitest';
import { worstDifference } from '../../../../tests/factories/reference';
import { binsOf } from '../arena/bins';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { seeded } from '../random/seeded';
import { adaptiveRates } from './adaptive-rates';
import { circlesOf } from './circles';

function ground(text: string, binCm: number) {
	const arena = parseArena(text);
	const bins = binsOf(arena, binCm);
	return { arena, bins, circles: circlesOf(arena, bins), metric: metricOf(arena) };
}
const settings = { alpha: 100, sampleRateHz: 10, minOccupancyS: 0.1 };

describe('circlesOf', () => {
	it.each([
		['straight:70', 5],
		['ring:70', 5],
		['ring:65', 5],
		['rectangle:35x20', 5],
		['disc:30', 5],
		['tree:0,0>40,0;40,0>40,40;40,0>80,0', 5]
	])('hold on %s the bins at most that far away, each once', (text, binCm) => {
		const { bins, circles, metric } = ground(text, binCm);
		const { centreXCm: x, centreYCm: y } = bins;
		for (let bin = 0; bin < bins.count; bin += 3) {
			const seen: number[] = [];
			for (let radius = 0; radius <= circles.largest; radius++) {
				circles.each(bin, radius, (near) => {
					const far = metric(x[bin], y[bin], x[near], y[near]) / binCm;
					expect(far).toBeLessThanOrEqual(radius + 1e-9);
					expect(far).toBeGreaterThan(radius - 1);
					seen.push(near);
				});
			}
			expect(seen.sort((a, b) => a - b)).toEqual([...Array(bins.count).keys()]);
		}
	});
});

describe('adaptiveRates', () => {
	it('grows each circle until it holds enough (worked by hand)', () => {
		const { circles } = ground('straight:7', 1);
		const samples = Float64Array.of(10, 10, 10, 10, 10, 10, 10);
		const counts = Float64Array.of(0, 0, 0, 4, 0, 0, 0);
		// Middle: radius 1 holds 30 samples, 4 spikes: 1 · 30 · 2 = 60 < 100; radius 2: 2 · 50 · 2.
		// Its neighbours: radius 1 gives 60; radius 2 holds 50 samples and the same spikes.
		// Next: radius 1 has no spike; radius 2 holds 40 samples: 2 · 40 · 2 = 160.
		// Ends: radius 3 holds 40 samples: 3 · 40 · 2 = 240.
		const got = adaptiveRates(counts, samples, circles, settings);
		expect([...got]).toEqual([1, 1, 0.8, 0.8, 0.8, 1, 1]);
	});

	it('equals the definition written out, in the open and on a ring', () => {
		for (const [text, binCm] of [
			['rectangle:50x40', 5],
			['ring:120', 5],
			['tree:0,0>40,0;40,0>40,40;40,0>80,0', 5]
		] as const) {
			const { bins, circles, metric } = ground(text, binCm);
			const { centreXCm: x, centreYCm: y } = bins;
			const random = seeded(9);
			const samples = Float64Array.from({ length: bins.count }, () => random.below(20));
			const counts = samples.map((n) => (n > 0 ? random.below(3) : 0));
			const slow = samples.map((n, bin) => {
				if (n < 1) return NaN;
				for (let radius = 1; ; radius++) {
					let [inside, spikes] = [0, 0];
					for (let near = 0; near < bins.count; near++) {
						if (metric(x[bin], y[bin], x[near], y[near]) > binCm * radius + 1e-9) continue;
						inside += samples[near];
						spikes += counts[near];
					}
					if (radius >= 400 / (inside * Math.sqrt(spikes))) return (10 * spikes) / inside;
				}
			});
			const got = adaptiveRates(counts, samples, circles, { ...settings, alpha: 400 });
			expect(worstDifference(got, slow)).toBeLessThan(1e-12);
		}
	});

	it('smooths more with a larger α, up to the mean rate of the arena', () => {
		const { circles } = ground('rectangle:40x40', 5);
		const random = seeded(2);
		const samples = new Float64Array(64).fill(40);
		const counts = samples.map(() => random.below(9));
		const spikes = counts.reduce((a, b) => a + b, 0);
		const mean = (10 * spikes) / (64 * 40);
		const spread = (alpha: number) => {
			const rates = adaptiveRates(counts, samples, circles, { ...settings, alpha });
			return rates.reduce((sum, rate) => sum + (rate - mean) ** 2, 0);
		};
		expect(spread(5000)).toBeLessThan(spread(100));
		// Enough only at radius 10, which holds the arena even from a corner.
		expect(spread(9.5 * 64 * 40 * Math.sqrt(spikes))).toBeLessThan(1e-20);
	});

	it('is 0 where a silent unit was looked for, and undefined where nobody was', () => {
		const { circles } = ground('straight:4', 1);
		const silent = new Float64Array(4);
		const got = adaptiveRates(silent, Float64Array.of(5, 0, 0.5, 1), circles, settings);
		expect([...got]).toEqual([0, NaN, NaN, 0]);
		const nowhere = adaptiveRates(silent, new Float64Array(4), circles, settings);
		expect([...nowhere]).toEqual([NaN, NaN, NaN, NaN]);
	});

	it('is undefined when the whole arena is too little for its α', () => {
		const { circles } = ground('straight:4', 1);
		const counts = Float64Array.of(0, 1, 0, 0);
		const samples = new Float64Array(4).fill(5);
		const got = adaptiveRates(counts, samples, circles, { ...settings, alpha: 1e5 });
		expect(got.every(Number.isNaN)).toBe(true);
		expect([...counts]).toEqual([0, 1, 0, 0]);
	});

	it('refuses settings not above 0 and arrays of two lengths', () => {
		const { circles } = ground('straight:4', 1);
		const four = new Float64Array(4);
		expect(() => adaptiveRates(four, four, circles, { ...settings, alpha: 0 })).toThrow(RangeError);
		expect(() => adaptiveRates(four, four, circles, { ...settings, minOccupancyS: 0 })).toThrow(
			RangeError
		);
		expect(() => adaptiveRates(four, new Float64Array(3), circles, settings)).toThrow(RangeError);
	});
});
