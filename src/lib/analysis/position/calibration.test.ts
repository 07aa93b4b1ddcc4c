import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { homography, type Pixel } from './homography';
import { pixelScale, pixelsToCm } from './pixel-scale';

describe('pixelScale', () => {
	it('gives a quarter of a centimetre per pixel for 180 cm over 720 px (worked by hand)', () => {
		const { input, expected } = referenceCase<
			{ markPx: [number, number]; cm: number; px: number },
			{ cmPerPx: number; cm: number }
		>('00_checks.json', 'a1');
		const scale = pixelScale(...input.markPx, input.cm);
		expect(scale.cmPerPx).toBe(expected.cmPerPx);
		expect(pixelsToCm(Float64Array.of(input.px), scale)[0]).toBe(expected.cm);
	});

	it('agrees with numpy, also left of the first mark', () => {
		const { input, expected, tol } = referenceCase<
			{ markPxA: number; markPxB: number; distanceCm: number; px: number[] },
			{ cmPerPx: number; cm: number[] }
		>('01_position.json', 'px_to_cm');
		const scale = pixelScale(input.markPxA, input.markPxB, input.distanceCm);
		expect(scale.cmPerPx).toBe(expected.cmPerPx);
		const got = pixelsToCm(Float64Array.from(input.px), scale);
		expect(worstDifference(got, expected.cm)).toBeLessThan(tol);
	});

	it('turns y upward when the lower mark is given first', () => {
		const scale = pixelScale(480, 80, 100);
		const got = pixelsToCm(Float64Array.of(480, 280, 80, NaN), scale);
		expect(worstDifference(got, [0, 50, 100, null])).toBe(0);
	});

	it.each([0, -180, NaN, Infinity])('refuses %d cm between the marks', (cm) => {
		expect(() => pixelScale(120, 840, cm)).toThrow(RangeError);
	});

	it('refuses marks on one pixel, and marks that are no number', () => {
		expect(() => pixelScale(120, 120, 180)).toThrow(RangeError);
		expect(() => pixelScale(120, NaN, 180)).toThrow(RangeError);
	});
});

const px = (...list: [number, number][]): Pixel[] => list.map(([xPx, yPx]) => ({ xPx, yPx }));
const cm = (...list: [number, number][]) => list.map(([xCm, yCm]) => ({ xCm, yCm }));
const FLOOR = cm([0, 0], [100, 0], [100, 80], [0, 80]);

/** A pinhole camera `heightCm` above the floor, tilted about its horizontal axis. */
function camera(tiltDeg: number, heightCm: number) {
	const tilt = (tiltDeg * Math.PI) / 180;
	return (xCm: number, yCm: number): Pixel => {
		const x = xCm - 50;
		const y = (yCm - 40) * Math.cos(tilt);
		const far = heightCm + (yCm - 40) * Math.sin(tilt);
		return { xPx: 320 + (600 * x) / far, yPx: 240 - (600 * y) / far };
	};
}

describe('homography', () => {
	it('undoes a tilted camera everywhere on the floor, not only at the marks (pinhole model)', () => {
		const see = camera(35, 200);
		const toFloor = homography(
			FLOOR.map(({ xCm, yCm }) => see(xCm, yCm)),
			FLOOR
		);
		const random = seeded(11);
		for (let round = 0; round < 100; round++) {
			const x = 140 * random.next() - 20;
			const y = 120 * random.next() - 20;
			const { xPx, yPx } = see(x, y);
			const got = toFloor(xPx, yPx);
			expect(got.xCm).toBeCloseTo(x, 9);
			expect(got.yCm).toBeCloseTo(y, 9);
		}
	});

	it('is the plain scale for a camera that looks straight down', () => {
		const toFloor = homography(px([120, 400], [520, 400], [520, 80], [120, 80]), FLOOR);
		const x = pixelScale(120, 520, 100);
		const y = pixelScale(400, 80, 80);
		const got = toFloor(333, 210);
		expect(got.xCm).toBeCloseTo((333 - x.zeroPx) * x.cmPerPx, 9);
		expect(got.yCm).toBeCloseTo((210 - y.zeroPx) * y.cmPerPx, 9);
	});

	it('puts the crossing of the diagonals where the diagonals cross on the floor', () => {
		// Lines stay lines: the diagonals of this trapezium meet at (50, 200/3), by hand.
		const toFloor = homography(px([0, 0], [100, 0], [75, 100], [25, 100]), FLOOR);
		const got = toFloor(50, 200 / 3);
		expect(got.xCm).toBeCloseTo(50, 9);
		expect(got.yCm).toBeCloseTo(40, 9);
	});

	it('knows no place beyond the horizon', () => {
		// The sides of the trapezium meet at (50, 200).
		const toFloor = homography(px([0, 0], [100, 0], [75, 100], [25, 100]), FLOOR);
		expect(toFloor(50, 199).yCm).toBeGreaterThan(1000);
		expect(toFloor(50, 201).xCm).toBeNaN();
		expect(toFloor(NaN, 10).yCm).toBeNaN();
	});

	it('refuses marks in a line, on either side, and marks in another order', () => {
		const square = px([0, 0], [400, 0], [400, 320], [0, 320]);
		const inLine = px([0, 0], [200, 0], [400, 0], [0, 320]);
		expect(() => homography(inLine, FLOOR)).toThrow('in a line');
		expect(() => homography(square, cm([0, 0], [50, 40], [100, 80], [0, 80]))).toThrow('in a line');
		const crossed = [FLOOR[0], FLOOR[2], FLOOR[1], FLOOR[3]];
		expect(() => homography(square, crossed)).toThrow('another order');
		expect(() => homography(square.slice(1), FLOOR)).toThrow('four marks');
	});

	it('refuses the same mark given twice', () => {
		expect(() => homography(px([0, 0], [0, 0], [400, 320], [0, 320]), FLOOR)).toThrow(RangeError);
	});
});
