import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { coincidentSpikes } from './coincident-spikes';
import { inherit } from './inheritance';

const train = (count: number, seed: number) => {
	const random = seeded(seed * 7919);
	return Float64Array.from({ length: count }, () => 600 * random.next()).sort();
};
const joined = (...trains: Float64Array[]) =>
	Float64Array.from(trains.flatMap((t) => [...t])).sort();

describe('coincidentSpikes', () => {
	it('uses every spike once (by hand)', () => {
		const a = Float64Array.of(1, 1.0004, 2, 5);
		expect(coincidentSpikes(a, Float64Array.of(1.0002, 2.0004, 4), 0.0005)).toBe(2);
		expect(coincidentSpikes(a, Float64Array.of(1.0002, 1.0003), 0.0005)).toBe(2);
		expect(coincidentSpikes(a, new Float64Array(0), 0.0005)).toBe(0);
		expect(() => coincidentSpikes(a, a, -1)).toThrow(RangeError);
	});

	it('counts the same both ways, and all spikes of a train with itself', () => {
		const a = train(3000, 1);
		const b = train(2000, 2);
		expect(coincidentSpikes(a, b, 0.01)).toBe(coincidentSpikes(b, a, 0.01));
		expect(coincidentSpikes(a, a, 0)).toBe(3000);
	});
});

describe('inherit', () => {
	const a = train(800, 3);
	const b = train(600, 4);
	const c = train(500, 5);

	it('follows relabelled units whose spikes moved by a sample or two', () => {
		const moved = (t: Float64Array) => t.map((s, k) => s + (k % 3) * 0.0001);
		const { heirs, withoutOld, withoutHeir } = inherit([a, b, c], [moved(c), moved(a), moved(b)]);
		expect(heirs.map(({ old, fresh }) => [old, fresh])).toEqual([
			[0, 1],
			[1, 2],
			[2, 0]
		]);
		expect(heirs.every(({ shareOfOld, shareOfFresh }) => shareOfOld + shareOfFresh > 1.98)).toBe(
			true
		);
		expect(withoutOld).toEqual([]);
		expect(withoutHeir).toEqual([]);
	});

	it('hands on to the part that kept at least four fifths, and lists the rest with its origin', () => {
		const most = a.filter((_, k) => k % 10 !== 0);
		const rest = a.filter((_, k) => k % 10 === 0);
		const { heirs, withoutOld } = inherit([a], [rest, most]);
		expect(heirs).toMatchObject([{ old: 0, fresh: 1, shareOfOld: 0.9, shareOfFresh: 1 }]);
		expect(withoutOld).toMatchObject([{ fresh: 0, nearest: { old: 0, coincident: 80 } }]);
	});

	it('hands on nothing from two units that were merged, or one cut in half', () => {
		const merged = inherit([a, b], [joined(a, b)]);
		expect(merged.heirs).toEqual([]);
		expect(merged.withoutHeir).toEqual([0, 1]);
		expect(merged.withoutOld[0].nearest?.old).toBe(0);
		const halves = inherit([a], [a.filter((_, k) => k < 400), a.filter((_, k) => k >= 400)]);
		expect(halves.heirs).toEqual([]);
		expect(halves.withoutOld).toHaveLength(2);
	});

	it('takes a share of exactly four fifths, and no less', () => {
		const kept = (count: number) => a.filter((_, k) => k < count);
		expect(inherit([a], [kept(640)]).heirs).toHaveLength(1);
		expect(inherit([a], [kept(639)]).heirs).toHaveLength(0);
	});

	it('is silent about units without spikes and strangers, and refuses a share of none', () => {
		const got = inherit([new Float64Array(0)], [new Float64Array(0)]);
		expect(got.heirs).toEqual([]);
		expect(got.withoutOld).toEqual([{ fresh: 0, nearest: null }]);
		expect(inherit([], [a]).withoutOld).toEqual([{ fresh: 0, nearest: null }]);
		expect(inherit([a], []).withoutHeir).toEqual([0]);
		expect(() => inherit([a], [b], 0.0005, 0)).toThrow(RangeError);
	});
});
