import type { Bins } from '../arena/bins';
import type { Metric } from '../arena/metric';
import { logSumExp } from '../statistics/log-sum-exp';
import { denseTransition } from './dense-transition';
import { gridTransition } from './grid-transition';
import { lineLogWeights } from './walk-weights';

/**
 * One step of a hidden walk with transition A(x, x′), from place x to place x′, in logarithms: no
 * evidence is so strong that a place gets lost. Every function reads and writes one number per place.
 */
export interface Transition {
	readonly places: number;
	/** v(x′) ← ln Σₓ exp(v(x)) A(x, x′). */
	readonly forward: (logBelief: Float64Array) => void;
	/** v(x) ← ln Σₓ′ A(x, x′) exp(v(x′)). */
	readonly backward: (logFuture: Float64Array) => void;
	/** v(x′) ← maxₓ v(x) + ln A(x, x′); `from` gets the x, the lowest in a tie. */
	readonly best: (logScore: Float64Array, from: Int32Array) => void;
}

/**
 * The random walk of `randomWalk`, with everything that smoothing and the most probable path ask
 * of it: A(x, x′) ∝ exp(−d(x, x′)²/2σ²), rows renormalised over the places that can be answered.
 * @param bin     places, as bins of the arena
 * @param sigmaCm root-mean-square step, above 0
 * @throws RangeError sigmaCm not above 0
 * Cost: O(places²) once and per step on tracks; on a grid O(places · kernel).
 */
export function randomTransition(
	bins: Bins,
	bin: Int32Array,
	metric: Metric,
	sigmaCm: number
): Transition {
	if (!(sigmaCm > 0)) throw new RangeError(`the walk's σ must be above 0 cm, got ${sigmaCm}`);
	if (bins.dimensions === 2) return gridTransition(bins, bin, sigmaCm);
	const places = bin.length;
	const logRows = lineLogWeights(bins, bin, metric, sigmaCm);
	for (let from = 0; from < places; from++) {
		const row = logRows.subarray(from * places, (from + 1) * places);
		const logTotal = logSumExp(row);
		for (let to = 0; to < places; to++) row[to] -= logTotal;
	}
	return denseTransition(logRows);
}
