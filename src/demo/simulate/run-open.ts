import { drawNormal } from '$lib/analysis/random/normal-draw';
import type { Random } from '$lib/analysis/random/seeded';
import { SAMPLE_HZ, emptyPath, type TruePath } from './path';

/** Closest the head comes to a wall, cm. */
const WALL_CM = 2;

/** Foraging in a rectangle: a direction that wanders, short stops, and walls that turn it away. */
export function runOpen(
	widthCm: number,
	heightCm: number,
	durationS: number,
	random: Random
): TruePath {
	const path = emptyPath(durationS);
	let x = widthCm / 2;
	let y = heightCm / 2;
	let angle = 2 * Math.PI * random.next();
	let speed = 20;
	let stopS = 0;
	for (let i = 0; i < path.tS.length; i++) {
		angle += (1.8 * drawNormal(random)) / Math.sqrt(SAMPLE_HZ);
		speed = Math.max(
			4,
			speed + (20 - speed) / SAMPLE_HZ + (9 * drawNormal(random)) / Math.sqrt(SAMPLE_HZ)
		);
		if (stopS > 0) stopS -= 1 / SAMPLE_HZ;
		else if (random.next() < 0.04 / SAMPLE_HZ) stopS = 2;
		else {
			x += (speed * Math.cos(angle)) / SAMPLE_HZ;
			y += (speed * Math.sin(angle)) / SAMPLE_HZ;
		}
		const inX = Math.min(Math.max(x, WALL_CM), widthCm - WALL_CM);
		const inY = Math.min(Math.max(y, WALL_CM), heightCm - WALL_CM);
		if (inX !== x || inY !== y) {
			angle = Math.atan2(heightCm / 2 - inY, widthCm / 2 - inX) + 0.8 * drawNormal(random);
		}
		path.xCm[i] = x = inX;
		path.yCm[i] = y = inY;
	}
	return path;
}
