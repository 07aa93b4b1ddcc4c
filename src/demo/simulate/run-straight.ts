import { drawNormal } from '$lib/analysis/random/normal-draw';
import type { Random } from '$lib/analysis/random/seeded';
import { between } from './between';
import { SAMPLE_HZ, emptyPath, type TruePath } from './path';

/** How close to an end the animal turns, cm. */
const END_CM = 8;

/**
 * Laps on a straight track: runs at a speed that wanders about one drawn for the lap, slower near
 * the ends, and waits there for its reward.
 */
export function runStraight(lengthCm: number, durationS: number, random: Random): TruePath {
	const path = emptyPath(durationS);
	let x = END_CM;
	let y = 0;
	let heading: 1 | -1 = 1;
	let waitS = between(random, 1, 4);
	let lapSpeed = between(random, 35, 60);
	let wander = 0;
	for (let i = 0; i < path.tS.length; i++) {
		// Speed and the way across wander with time constants of about a second.
		wander += (-wander + 5 * drawNormal(random)) / SAMPLE_HZ;
		y += (-y / 2 + 2 * drawNormal(random)) / Math.sqrt(SAMPLE_HZ) / 4;
		if (waitS > 0) {
			waitS -= 1 / SAMPLE_HZ;
		} else {
			const toEnd = Math.min(x, lengthCm - x);
			const slowing = Math.min(1, 0.25 + toEnd / 40);
			x += (heading * Math.max(8, (lapSpeed + 4 * wander) * slowing)) / SAMPLE_HZ;
			path.heading[i] = heading;
			if (heading > 0 ? x >= lengthCm - END_CM : x <= END_CM) {
				x = heading > 0 ? lengthCm - END_CM : END_CM;
				heading = heading > 0 ? -1 : 1;
				waitS = between(random, 2, 7);
				lapSpeed = between(random, 35, 60);
			}
		}
		path.xCm[i] = x;
		path.yCm[i] = y;
	}
	return path;
}
