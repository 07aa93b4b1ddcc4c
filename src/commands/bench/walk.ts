import type { Chance } from './chance';
import type { DaySize } from './sizes';

/** Where an animal goes: to and fro on a track with pauses at the ends, or about in a box. */
export function walk(size: DaySize, chance: Chance): { xCm: Float64Array; yCm: Float64Array } {
	const { widthCm, heightCm, hz } = size;
	const samples = size.minutes * 60 * hz;
	const stepS = 1 / hz;
	const xCm = new Float64Array(samples);
	const yCm = new Float64Array(samples);
	let x = widthCm / 2;
	let y = heightCm / 2;
	let heading = 2 * Math.PI * chance.uniform();
	let way = 1;
	let speedCmS = 12;
	let pauseS = 0;
	for (let i = 0; i < samples; i++) {
		if (size.binsY > 1) {
			heading += 1.6 * Math.sqrt(stepS) * chance.normal();
			speedCmS += (13 - speedCmS) * stepS * 1.2 + 9 * Math.sqrt(stepS) * chance.normal();
			if (speedCmS < 0) speedCmS = 0;
			x += speedCmS * Math.cos(heading) * stepS;
			y += speedCmS * Math.sin(heading) * stepS;
			if (x < 0 || x > widthCm) {
				x = x < 0 ? -x : 2 * widthCm - x;
				heading = Math.PI - heading;
			}
			if (y < 0 || y > heightCm) {
				y = y < 0 ? -y : 2 * heightCm - y;
				heading = -heading;
			}
		} else if (pauseS > 0) {
			pauseS -= stepS;
		} else {
			speedCmS += (25 - speedCmS) * stepS * 2 + 10 * Math.sqrt(stepS) * chance.normal();
			speedCmS = Math.max(2, speedCmS);
			x += way * speedCmS * stepS;
			if (x > widthCm - 2 || x < 2) {
				x = Math.min(widthCm - 2, Math.max(2, x));
				way = -way;
				pauseS = 1 + 3 * chance.uniform();
			}
		}
		xCm[i] = x;
		yCm[i] = size.binsY > 1 ? y : heightCm / 2;
	}
	return { xCm, yCm };
}
