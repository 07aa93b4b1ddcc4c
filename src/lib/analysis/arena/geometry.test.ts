import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { alongStraight } from './along-straight';
import { binsOf } from './bins';
import { circleCentre } from './circle-centre';
import { metricOf } from './metric';
import { parseArena } from './parse-arena';
import { placeInArena } from './place-in-arena';
import { projectOnPieces, segmentsOf } from './project-on-pieces';
import { ringOffset, ringPosition, ringStep, unwrapRing } from './ring';

const FILE = '01_position.json';
const always = () => true;

function polyline(points: readonly (readonly number[])[]) {
	const arena = parseArena(`polyline:${points.map((p) => p.join(',')).join(';')}`);
	if (arena.kind !== 'polyline') throw new Error('expected a polyline');
	return segmentsOf(arena);
}

describe('ring', () => {
	it('takes the short way round, half way counting as negative', () => {
		expect(ringStep(295, 10, 300)).toBe(15);
		expect(ringStep(10, 295, 300)).toBe(-15);
		expect(ringStep(0, 150, 300)).toBe(-150);
	});

	it('equals numpy on random pairs', () => {
		const { input, expected, tol } = referenceCase<
			{ C: number; a: number[]; b: number[] },
			{ signed: number[]; distance: number[] }
		>(FILE, 'circular_distance');
		const got = input.a.map((a, i) => ringStep(a, input.b[i], input.C));
		expect(worstDifference(got, expected.signed)).toBeLessThan(tol);
		const metric = metricOf(parseArena(`ring:${input.C}`));
		const ways = input.a.map((a, i) => metric(a, NaN, input.b[i], NaN));
		expect(worstDifference(ways, expected.distance)).toBeLessThan(tol);
	});

	it('adds up laps as numpy.unwrap does', () => {
		const { input, expected, tol } = referenceCase<
			{ C: number; s: number[] },
			{ unwrapped: number[]; lap: number[] }
		>(FILE, 'unwrap_and_laps');
		const got = unwrapRing(input.s, input.C);
		expect(worstDifference(got, expected.unwrapped)).toBeLessThan(tol);
		expect([...got].map((s) => Math.floor((s - got[0]) / input.C))).toEqual(expected.lap);
		const short = unwrapRing([290, 295, 2, 10, 299, 3], 300);
		expect(worstDifference(short, [290, 295, 302, 310, 299, 303])).toBeLessThan(1e-9);
	});

	it('linearises a circle as atan2 gives it, with centre and zero known', () => {
		const { input, expected, tol } = referenceCase<
			{ R: number; cx: number; cy: number; theta0Deg: number; xy: [number, number][] },
			{ s: number[]; radialError: number[]; circumference: number }
		>(FILE, 'circle_linearise');
		const centre = { xCm: input.cx, yCm: input.cy };
		const zero = (input.theta0Deg * Math.PI) / 180;
		const around = 2 * Math.PI * input.R;
		expect(Math.abs(around - expected.circumference)).toBeLessThan(tol);
		const got = input.xy.map(([x, y]) => ringPosition(x, y, centre, around, zero));
		expect(worstDifference(got, expected.s)).toBeLessThan(tol);
		const off = input.xy.map(([x, y]) => ringOffset(x, y, centre, around));
		expect(worstDifference(off, expected.radialError)).toBeLessThan(tol);
	});

	it('finds the centre of a circle from its points', () => {
		const angles = Float64Array.from({ length: 40 }, (_, i) => i / 7);
		const centre = circleCentre(
			angles.map((a) => 60 + 40 * Math.cos(a)),
			angles.map((a) => 55 + 40 * Math.sin(a)),
			always
		);
		expect(centre.xCm).toBeCloseTo(60, 9);
		expect(centre.yCm).toBeCloseTo(55, 9);
	});
});

describe('projection on a polyline', () => {
	it('takes the nearest piece and clamps its foot (hand-worked U)', () => {
		const u = polyline([
			[0, 0],
			[0, 100],
			[80, 100],
			[80, 0]
		]);
		expect(projectOnPieces(u, 10, 95)).toMatchObject({ alongCm: 110, offCm: 5 });
		expect(projectOnPieces(u, 78, 40)).toMatchObject({ alongCm: 240, offCm: 2 });
	});

	it('equals clamped projection in numpy', () => {
		const { input, expected, tol } = referenceCase<
			{ vertices: number[][]; xy: [number, number][] },
			{ s: number[]; distance: number[]; segment: number[]; totalLength: number }
		>(FILE, 'polyline_project');
		const feet = input.xy.map(([x, y]) => projectOnPieces(polyline(input.vertices), x, y));
		expect(
			worstDifference(
				feet.map((f) => f.alongCm),
				expected.s
			)
		).toBeLessThan(tol);
		expect(
			worstDifference(
				feet.map((f) => f.offCm),
				expected.distance
			)
		).toBeLessThan(tol);
		expect(feet.map((f) => f.piece)).toEqual(expected.segment);
		const { startCm, lengthCm } = polyline(input.vertices)[2];
		expect(startCm + lengthCm).toBe(expected.totalLength);
	});
});

describe('straight track', () => {
	it('runs along the axis of largest spread, larger component positive, zero at the lowest run sample', () => {
		const x = Float64Array.of(50, 40, 30, 20, 10);
		const y = Float64Array.of(5, 15, 25, 35, 45);
		const { alongCm, offCm } = alongStraight(x, y, (i) => i < 4);
		expect(
			worstDifference(
				alongCm,
				[3, 2, 1, 0, -1].map((k) => k * Math.sqrt(200))
			)
		).toBeLessThan(1e-9);
		expect(Math.max(...offCm)).toBeLessThan(1e-9);
	});

	it('runs from A to B when the ends are known, and drops what is far off', () => {
		const ends = { a: { xCm: 100, yCm: 0 }, b: { xCm: 0, yCm: 0 } };
		const arena = parseArena('straight:100');
		const x = Float64Array.of(90, 104, 110, 50);
		const y = Float64Array.of(3, 0, 0, 20);
		const placed = placeInArena(arena, metricOf(arena), x, y, always, ends);
		expect([...placed.xCm]).toEqual([10, 0, NaN, NaN]);
		expect(placed.outside).toBe(2);
	});
});

describe('branched maze', () => {
	const arena = parseArena('tree:0,0>60,0;60,0>60,80;60,0>120,0');
	const metric = metricOf(arena);

	it('measures through the junction, never as a difference of positions', () => {
		expect(metric(50, NaN, 70, NaN)).toBe(20);
		expect(metric(70, NaN, 150, NaN)).toBe(20);
		expect(metric(140 - 1e-9, NaN, 200, NaN)).toBeCloseTo(140, 6);
	});

	it('keeps the end of an arm on its own arm', () => {
		const placed = placeInArena(arena, metric, Float64Array.of(60), Float64Array.of(82), always);
		expect(placed.xCm[0]).toBeCloseTo(140, 5);
		expect(binsOf(arena, 20).of(placed.xCm[0], NaN)).toBe(6);
	});

	it('does not flicker to another arm at the junction', () => {
		const x = Float64Array.of(40, 55, 58, 60, 60);
		const y = Float64Array.of(0, 0, 2.2, 6, 30);
		const { xCm } = placeInArena(arena, metric, x, y, always);
		expect(xCm[2]).toBeLessThan(60);
		expect(xCm[4]).toBeCloseTo(90, 9);
	});

	it('lets an animal that was out of sight come back on any arm', () => {
		const hairpin = parseArena('tree:0,0>60,0;60,0>60,10;60,10>0,10');
		const x = Float64Array.of(5, NaN, 10);
		const y = Float64Array.of(0, NaN, 10);
		const { xCm } = placeInArena(hairpin, metricOf(hairpin), x, y, always);
		expect(xCm[2]).toBeCloseTo(120, 9);
	});

	it('cuts every piece into bins of its own', () => {
		const bins = binsOf(arena, 25);
		expect(bins.count).toBe(3 + 4 + 3);
		expect(bins.of(59, NaN)).toBe(2);
		expect(bins.of(61, NaN)).toBe(3);
	});
});

describe('binsOf', () => {
	it('is half open, gives the right edge to the last bin and counts rows upward', () => {
		const line = binsOf(parseArena('straight:117'), 5);
		expect(line.count).toBe(24);
		expect([line.of(0, NaN), line.of(4.999, NaN), line.of(5, NaN), line.of(117, NaN)]).toEqual([
			0, 0, 1, 23
		]);
		const box = binsOf(parseArena('rectangle:100x80'), 5);
		expect([box.binsX, box.binsY]).toEqual([20, 16]);
		expect(box.of(12, 7)).toBe(22);
		expect([box.centreXCm[22], box.centreYCm[22]]).toEqual([12.5, 7.5]);
		expect(box.of(NaN, 7)).toBe(-1);
	});

	it('refuses widths that leave nothing or too much', () => {
		expect(() => binsOf(parseArena('straight:100'), 0)).toThrow(RangeError);
		expect(() => binsOf(parseArena('straight:100'), 200)).toThrow(RangeError);
		expect(() => binsOf(parseArena('rectangle:9000x9000'), 0.1)).toThrow(RangeError);
	});
});
