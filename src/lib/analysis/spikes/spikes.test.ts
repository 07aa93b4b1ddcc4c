import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { samplesOfSpikes } from './samples-of-spikes';
import { decodeSpikes, encodeSpikes } from './spike-blob';

describe('samplesOfSpikes', () => {
	it('gives a spike to the last sample at or before it, if that one still stands', () => {
		const got = samplesOfSpikes(
			Float64Array.of(-1, 0, 0.05, 0.1, 0.35, 0.45),
			Float64Array.of(0, 0.1, 0.4),
			Float64Array.of(0.1, 0.1, 0)
		);
		expect([...got]).toEqual([-1, 0, 0, 1, -1, -1]);
	});
});

describe('spike blob', () => {
	const back = (times: Float64Array) => decodeSpikes(encodeSpikes(times));

	it.each([1000, 20_000, 24_414.0625, 30_000, 32_000, 1_000_000])(
		'brings back every time of a %d Hz clock to the last bit, in few bytes',
		(rate) => {
			const random = seeded(rate);
			const ticks = Array.from({ length: 3000 }, () => random.below(rate * 3600));
			const times = Float64Array.from(ticks, (tick) => tick / rate).sort();
			const blob = encodeSpikes(times);
			expect(decodeSpikes(blob)).toEqual(times);
			expect(blob.length).toBeLessThan(times.length * 5);
		}
	);

	it('brings back times of no clock, negative times and repeated ones', () => {
		const random = seeded(5);
		const odd = Float64Array.from({ length: 500 }, () => random.next() * 1000).sort();
		expect(back(odd)).toEqual(odd);
		const edge = Float64Array.of(-12.5, -0.001, 0, 0, 0.001, 5_000_000);
		expect(back(edge)).toEqual(edge);
		const negativeZero = Float64Array.of(-0);
		expect(Object.is(back(negativeZero)[0], -0)).toBe(true);
		expect(back(new Float64Array(0))).toEqual(new Float64Array(0));
	});

	it('refuses disorder, missing values and bytes of another kind', () => {
		expect(() => encodeSpikes(Float64Array.of(2, 1))).toThrow(RangeError);
		expect(() => encodeSpikes(Float64Array.of(NaN))).toThrow(RangeError);
		expect(() => decodeSpikes(new Uint8Array(0))).toThrow(RangeError);
		expect(() => decodeSpikes(Uint8Array.of(7, 1, 2))).toThrow(RangeError);
		const cut = encodeSpikes(Float64Array.of(1, 2)).slice(0, -1);
		expect(() => decodeSpikes(cut)).toThrow(RangeError);
	});
});
