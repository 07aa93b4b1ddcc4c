import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { drawGroups, drawnMeans, drawnMedians, percentileInterval } from './bootstrap';
import { pairedWorth } from './paired-worth';
import { widenedInterval } from './widened-interval';

describe('bootstrap of laps', () => {
	it('gives the medians and the interval of listed draws (numpy)', () => {
		const { input, expected } = referenceCase<
			{ absErrorCm: number[]; lap: number[]; drawnLapRanks: number[][] },
			{ medians: number[]; ci95: [number, number]; se: number }
		>('09_error_metrics.json', 'lap_bootstrap_percentile');
		const laps = Math.max(...input.lap) + 1;
		const draws = input.drawnLapRanks.map((ranks) => {
			const copies = new Int32Array(laps);
			for (const rank of ranks) copies[rank]++;
			return copies;
		});
		const values = Float64Array.from(input.absErrorCm);
		const medians = drawnMedians(values, Int32Array.from(input.lap), draws);
		expect(worstDifference(medians, expected.medians)).toBeLessThan(1e-9);
		expect(worstDifference(percentileInterval(medians, 0.95), expected.ci95)).toBeLessThan(1e-9);
		const centre = medians.reduce((a, b) => a + b, 0) / medians.length;
		const squares = medians.reduce((sum, m) => sum + (m - centre) ** 2, 0);
		expect(Math.sqrt(squares / (medians.length - 1))).toBeCloseTo(expected.se, 9);
	});

	it('draws as many groups as there are, and leaves NaN out of means', () => {
		const draws = drawGroups(6, 40, seeded(9));
		expect(draws.every((copies) => copies.reduce((a, b) => a + b, 0) === 6)).toBe(true);
		const means = drawnMeans(Float64Array.of(1, NaN, 5), Int32Array.of(0, 0, 1), 2, [
			Int32Array.of(2, 0),
			Int32Array.of(1, 1),
			Int32Array.of(0, 0)
		]);
		expect([...means]).toEqual([1, 3, NaN]);
	});
});

describe('widenedInterval', () => {
	const drawn = Float64Array.from({ length: 1001 }, (_, i) => i / 1000);

	it('reads the quantiles Φ(±√(n/(n − 1)) t) (scipy.stats.t, scipy.stats.norm)', () => {
		const [low, high] = widenedInterval(drawn, 0.95, 30);
		expect(low).toBeCloseTo(0.01875390027822054, 9);
		expect(high).toBeCloseTo(1 - 0.01875390027822054, 9);
		expect(widenedInterval(drawn, 0.95, 10)[0]).toBeCloseTo(0.008550639024406366, 9);
	});

	it('is wider than the plain one and comes near it with many groups', () => {
		const [plain] = percentileInterval(drawn, 0.95);
		const lows = [5, 10, 30, 100, 1e6].map((groups) => widenedInterval(drawn, 0.95, groups)[0]);
		expect([...lows].sort((a, b) => a - b)).toEqual(lows);
		expect(lows.every((low) => low < plain)).toBe(true);
		expect(lows[4]).toBeCloseTo(plain, 5);
	});

	it('is undefined for one group or no draws, and refuses a share that is none', () => {
		expect(widenedInterval(drawn, 0.95, 1)).toEqual([NaN, NaN]);
		expect(widenedInterval(new Float64Array(0), 0.95, 8)).toEqual([NaN, NaN]);
		expect(() => widenedInterval(drawn, 1, 8)).toThrow(RangeError);
	});
});

describe('pairedWorth', () => {
	const random = seeded(6);
	const group = Int32Array.from({ length: 300 }, (_, w) => Math.floor(w / 15));
	// What makes a lap hard is shared by both sides and much larger than what the bundle adds.
	const hard = Float64Array.from({ length: 20 }, () => 40 * random.next());
	const withCm = Float64Array.from(group, (g) => hard[g] + random.next());
	const withoutCm = withCm.map((error) => error + 2);
	const bits = withCm.map(() => 0.5 + random.next());
	const draws = drawGroups(20, 400, seeded(7));

	it('draws both sides with the same laps, so that what they share cancels', () => {
		const told = pairedWorth(withCm, withoutCm, bits, group, draws);
		expect(told.errorCm).toBeCloseTo(2, 9);
		expect(told.errorIntervalCm[0]).toBeCloseTo(2, 9);
		expect(told.errorIntervalCm[1]).toBeCloseTo(2, 9);
		const [low, high] = told.bitsInterval;
		expect(low).toBeLessThan(told.bits);
		expect(high).toBeGreaterThan(told.bits);
		expect(high - low).toBeLessThan(0.2);
	});

	it('leaves unscorable windows out of the bits, gives no interval without draws', () => {
		const some = bits.slice().fill(NaN, 0, 150);
		const told = pairedWorth(withCm, withoutCm, some, group, []);
		expect(told.bits).toBeCloseTo(bits.subarray(150).reduce((a, b) => a + b, 0) / 150, 12);
		expect(told.errorIntervalCm).toEqual([NaN, NaN]);
		expect(told.bitsInterval).toEqual([NaN, NaN]);
	});

	it('refuses lengths that differ', () => {
		expect(() => pairedWorth(withCm, withoutCm.subarray(1), bits, group, draws)).toThrow(
			RangeError
		);
	});
});
