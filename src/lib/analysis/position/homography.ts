import { Matrix, solve } from 'ml-matrix';
import type { Point } from '../arena/arena';
import { mean } from '../statistics/mean';

/** A point of the camera picture, px. */
export interface Pixel {
	readonly xPx: number;
	readonly yPx: number;
}

/** Where a pixel lies on the floor; NaN coordinates beyond the horizon of the camera. */
export type ToFloor = (xPx: number, yPx: number) => Point;

type Flat = readonly [number, number];

/** Three marks whose triangle is smaller than this share of their spread stand in a line. */
const IN_LINE = 1e-6;

/**
 * Maps the picture of a tilted camera to the floor by four marks whose places are known, exactly at
 * the four marks: (x, y) = (h₁u + h₂v + h₃, h₄u + h₅v + h₆) / (h₇u + h₈v + 1), the eight h from
 * eight linear equations. Both sides are first centred and scaled to keep these well conditioned
 * (Hartley 1997). Pixels on the far side of the horizon, where the divisor changes sign, are NaN.
 * @param pixels four marks in the picture
 * @param floor  the same four on the floor, in the same order
 * @throws RangeError not four of each, three marks in a line, or marks in another order on the floor
 */
export function homography(pixels: readonly Pixel[], floor: readonly Point[]): ToFloor {
	if (pixels.length !== 4 || floor.length !== 4) {
		throw new RangeError(`four marks are needed, got ${pixels.length} and ${floor.length}`);
	}
	const from = normalised(pixels.map(({ xPx, yPx }) => [xPx, yPx]));
	const to = normalised(floor.map(({ xCm, yCm }) => [xCm, yCm]));
	// The four triangles keep their sense, or all change it (a picture has y downward), exactly when
	// no mark lies beyond the horizon.
	const senses = new Set(from.senses.map((sense, k) => sense * to.senses[k]));
	if (senses.size !== 1) {
		throw new RangeError('the marks go round in another order on the floor than in the picture');
	}
	const equations: number[][] = [];
	const sides: number[] = [];
	for (let k = 0; k < 4; k++) {
		const [u, v] = from.points[k];
		const [x, y] = to.points[k];
		equations.push([u, v, 1, 0, 0, 0, -u * x, -v * x], [0, 0, 0, u, v, 1, -u * y, -v * y]);
		sides.push(x, y);
	}
	const h = solve(new Matrix(equations), Matrix.columnVector(sides)).to1DArray();
	return (xPx, yPx) => {
		const u = (xPx - from.centre[0]) / from.spread;
		const v = (yPx - from.centre[1]) / from.spread;
		// 1 in the middle of the marks, so above 0 on their side of the horizon.
		const w = h[6] * u + h[7] * v + 1;
		if (!(w > 0)) return { xCm: NaN, yCm: NaN };
		return {
			xCm: to.centre[0] + (to.spread * (h[0] * u + h[1] * v + h[2])) / w,
			yCm: to.centre[1] + (to.spread * (h[3] * u + h[4] * v + h[5])) / w
		};
	};
}

interface Normalised {
	readonly centre: Flat;
	readonly spread: number;
	readonly points: readonly Flat[];
	/** Sense, +1 or −1, of the triangle that each point leaves when it is taken away. */
	readonly senses: readonly number[];
}

/** Moves points to mean 0 and mean distance 1. */
function normalised(points: readonly Flat[]): Normalised {
	const centre: Flat = [mean(points.map(([x]) => x)), mean(points.map(([, y]) => y))];
	const centred = points.map(([x, y]): Flat => [x - centre[0], y - centre[1]]);
	const spread = mean(centred.map(([x, y]) => Math.hypot(x, y)));
	const scaled = centred.map(([x, y]): Flat => [x / spread, y / spread]);
	const senses = scaled.map((_, left) => {
		const [a, b, c] = scaled.filter((_, k) => k !== left);
		const twiceArea = (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
		if (!(Math.abs(twiceArea) > IN_LINE)) {
			throw new RangeError('three of the four marks stand in a line');
		}
		return Math.sign(twiceArea);
	});
	return { centre, spread, points: scaled, senses };
}
