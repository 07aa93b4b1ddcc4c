import type { Random } from '$lib/analysis/random/seeded';
import { ceilingHz, rateHz, type TrueCell } from './cell';
import { SAMPLE_HZ, type TruePath } from './path';

/** Shortest time between two spikes of a cell, s. */
export const REFRACTORY_S = 0.002;

/**
 * Poisson spikes at the rate of the place, by thinning a steady process (Lewis and Shedler 1979),
 * with a dead time after each spike. No theta, no bursts: what is decoded from them is place alone.
 */
export function spikeTrain(cell: TrueCell, path: TruePath, random: Random): Float64Array {
	const ceiling = ceilingHz(cell);
	const endS = path.tS.length / SAMPLE_HZ;
	const spikes: number[] = [];
	let t = 0;
	for (;;) {
		t -= Math.log(1 - random.next()) / ceiling;
		if (!(t < endS)) return Float64Array.from(spikes);
		const i = Math.floor(t * SAMPLE_HZ);
		const rate = rateHz(cell, path.xCm[i], path.yCm[i], path.heading[i]);
		if (random.next() * ceiling >= rate) continue;
		spikes.push(t);
		t += REFRACTORY_S;
	}
}
