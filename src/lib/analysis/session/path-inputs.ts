import { longestStand } from '../position/standing-time';
import type { PositionInputs } from './result';

/** What the positions are, before any choice: samples, duration, step and time without a sample. */
export function positionInputs(tS: Float64Array, medianIntervalS: number): PositionInputs {
	const longestS = longestStand(medianIntervalS);
	let gapsS = 0;
	for (let i = 1; i < tS.length; i++) gapsS += Math.max(0, tS[i] - tS[i - 1] - longestS);
	return {
		samples: tS.length,
		durationS: tS[tS.length - 1] - tS[0],
		medianIntervalS,
		gapsS
	};
}
