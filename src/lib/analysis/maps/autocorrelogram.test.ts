import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { autocorrelogram } from './autocorrelogram';

/** Non-zero counts by the inner edge of their bin, positive lags, ms. */
function positive(counts: Float64Array): Record<number, number> {
	const half = counts.length / 2;
	const told: Record<number, number> = {};
	counts.slice(half).forEach((count, k) => {
		if (count > 0) told[k] = count;
	});
	return told;
}

describe('autocorrelogram', () => {
	it('counts every pair within 50 ms by its lag (worked by hand)', () => {
		const got = autocorrelogram(Float64Array.of(0, 0.0035, 0.0105, 0.06));
		expect(got).toHaveLength(100);
		// 3.5, 7 and 10.5 ms; 49.5 ms from the third to the last, 56.5 ms is too far.
		expect(positive(got)).toEqual({ 3: 1, 7: 1, 10: 1, 49: 1 });
	});

	it('is symmetric about lag 0', () => {
		const random = seeded(4);
		const times = Float64Array.from({ length: 400 }, () => 20 * random.next()).sort();
		const got = autocorrelogram(times);
		expect([...got].reverse()).toEqual([...got]);
	});

	it('equals counting every pair of a train by hand, for other bins too', () => {
		const random = seeded(5);
		const times = Float64Array.from({ length: 300 }, () => 6 * random.next()).sort();
		for (const [binS, reachS] of [
			[0.001, 0.05],
			[0.005, 0.1]
		]) {
			const bins = Math.round(reachS / binS);
			const slow = new Float64Array(2 * bins);
			for (const a of times) {
				for (const b of times) {
					const lag = b - a;
					if (lag === 0 || Math.abs(lag) >= reachS) continue;
					const bin = Math.floor(Math.abs(lag) / binS);
					slow[lag > 0 ? bins + bin : bins - 1 - bin]++;
				}
			}
			expect([...autocorrelogram(times, { binS, reachS })]).toEqual([...slow]);
		}
	});

	it('leaves out lag 0, also of two spikes of one moment', () => {
		expect(positive(autocorrelogram(Float64Array.of(1, 1, 1.0105)))).toEqual({ 10: 2 });
	});

	it('puts lags of whole milliseconds in their own bin on any clock, and 50 ms in the last', () => {
		const times = Float64Array.of(7200.001, 7200.002, 7200.004, 7200.051);
		expect(positive(autocorrelogram(times))).toEqual({ 1: 1, 2: 1, 3: 1, 47: 1, 49: 2 });
	});

	it('shows the refractory gap and the rhythm of a regular train', () => {
		const times = Float64Array.from({ length: 100 }, (_, i) => i * 0.0125);
		expect(positive(autocorrelogram(times))).toEqual({ 12: 99, 25: 98, 37: 97, 49: 96 });
	});

	it('has no pairs without two spikes, and leaves its input alone', () => {
		expect(autocorrelogram(new Float64Array(0)).some((count) => count > 0)).toBe(false);
		const times = Float64Array.of(3);
		expect(autocorrelogram(times).some((count) => count > 0)).toBe(false);
		expect([...times]).toEqual([3]);
	});

	it('refuses times out of order and a reach of no whole number of bins', () => {
		expect(() => autocorrelogram(Float64Array.of(2, 1))).toThrow(RangeError);
		expect(() => autocorrelogram(Float64Array.of(1), { binS: 0.003 })).toThrow(RangeError);
		expect(() => autocorrelogram(Float64Array.of(1), { binS: 0 })).toThrow(RangeError);
		expect(() => autocorrelogram(Float64Array.of(1), { reachS: 0 })).toThrow(RangeError);
	});
});
