import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { metricOf } from '../arena/metric';
import { parseArena } from '../arena/parse-arena';
import { mod } from '../arena/ring';
import { movingSamples } from './moving-samples';
import { ringDirection } from './ring-direction';
import { speedOf } from './speed';

const one = (n: number) => new Int32Array(n);

describe('speedOf', () => {
	const line = metricOf(parseArena('straight:1000'));

	it('is the central difference, one-sided at the ends (worked by hand)', () => {
		const { input, expected, tol } = referenceCase<
			{ x: number[]; dt: number },
			{ speed: number[] }
		>('00_checks.json', 'a2');
		const tS = Float64Array.from(input.x, (_, i) => i * input.dt);
		const x = Float64Array.from(input.x);
		const got = speedOf(tS, x, new Float64Array(5), one(5), 1, line);
		expect(worstDifference(got, expected.speed)).toBeLessThan(tol);
	});

	it('is undefined next to an undefined sample', () => {
		const tS = Float64Array.of(0, 1, 2, 3, 4, 5, 6);
		const x = Float64Array.of(0, 1, 2, NaN, 4, 5, 6);
		const got = speedOf(tS, x, new Float64Array(7), one(7), 1, line);
		expect([...got.slice(0, 3)]).toEqual([1, 1, NaN]);
		expect([...got.slice(4)]).toEqual([NaN, 1, 1]);
	});

	it('goes the short way round a ring', () => {
		const ring = metricOf(parseArena('ring:300'));
		const x = Float64Array.of(295, 5, 15);
		const got = speedOf(Float64Array.of(0, 1, 2), x, new Float64Array(3), one(3), 1, ring);
		expect([...got]).toEqual([10, 10, 10]);
	});
});

describe('movingSamples', () => {
	const stand = (n: number) => new Float64Array(n).fill(0.1);

	it('keeps what is at least as fast as the least speed and says for how long', () => {
		const speed = Float64Array.of(4.9, 5, NaN, 9, 0);
		const { isKept, keptS } = movingSamples(speed, stand(5), one(5));
		expect([...isKept]).toEqual([0, 1, 0, 1, 0]);
		expect(keptS).toBeCloseTo(0.2, 12);
	});

	it('drops runs shorter than half a second, keeping one of exactly that', () => {
		const speed = Float64Array.of(9, 9, 9, 9, 9, 0, 9, 9, 9, 9, NaN, 9);
		const { isKept, keptS } = movingSamples(speed, stand(12), one(12), 5, 0.5);
		expect([...isKept]).toEqual([1, 1, 1, 1, 1, 0, 0, 0, 0, 0, 0, 0]);
		expect(keptS).toBeCloseTo(0.5, 12);
	});

	it('does not join runs of two stretches, and keeps nothing outside them', () => {
		const speed = new Float64Array(8).fill(20);
		const stretch = Int32Array.of(0, 0, 0, 1, 1, 1, -1, -1);
		expect(movingSamples(speed, stand(8), stretch, 5, 0.5).keptS).toBe(0);
		expect([...movingSamples(speed, stand(8), stretch).isKept]).toEqual([1, 1, 1, 1, 1, 1, 0, 0]);
	});

	it('never keeps more with a higher bar or longer runs', () => {
		const speed = Float64Array.from({ length: 200 }, (_, i) => 12 * Math.abs(Math.sin(i * i)));
		const kept = (least: number, runS: number) =>
			movingSamples(speed, stand(200), one(200), least, runS).keptS;
		expect(kept(0, 0)).toBeCloseTo(20, 9);
		for (let least = 0; least < 12; least++) {
			expect(kept(least + 1, 0)).toBeLessThanOrEqual(kept(least, 0));
			expect(kept(least, 0.3)).toBeLessThanOrEqual(kept(least, 0.2));
		}
	});

	it('refuses negative bars', () => {
		expect(() => movingSamples(stand(1), stand(1), one(1), -1)).toThrow(RangeError);
		expect(() => movingSamples(stand(1), stand(1), one(1), 5, -1)).toThrow(RangeError);
	});
});

describe('ringDirection', () => {
	const at = (x: number[], dt = 0.1) => Float64Array.from(x, (_, i) => i * dt);
	const way = (x: number[], stretch = one(x.length)) => [
		...ringDirection(at(x), Float64Array.from(x), stretch, 300)
	];

	it('follows the net way over half a second, over the seam too', () => {
		expect(way([280, 290, 299, 8, 18])).toEqual([1, 1, 1, 1, 1]);
		expect(way([18, 8, 299, 290, 280])).toEqual([-1, -1, -1, -1, -1]);
	});

	it('is not turned by one step back inside a run', () => {
		const x = [0, 10, 20, 19, 30, 40].map((s) => mod(s, 300));
		expect(way(x)).toEqual([1, 1, 1, 1, 1, 1]);
	});

	it('turns where the animal turns', () => {
		const x = [100, 110, 120, 130, 140, 130, 120, 110, 100];
		expect(way(x)).toEqual([1, 1, 1, 1, 0, -1, -1, -1, -1]);
	});

	it('is 0 at rest, where the place is unknown, outside, and never looks over a gap', () => {
		expect(way([5, 5, 5])).toEqual([0, 0, 0]);
		expect(way([0, 1, NaN, 90, 80])).toEqual([1, 1, 0, -1, -1]);
		expect(way([0, 1, 90, 80], Int32Array.of(0, 0, 1, 1))).toEqual([1, 1, -1, -1]);
		expect(way([0, 1], Int32Array.of(-1, -1))).toEqual([0, 0]);
	});

	it('refuses to read over no time', () => {
		expect(() => ringDirection(at([0]), Float64Array.of(0), one(1), 300, 0)).toThrow(RangeError);
	});
});
