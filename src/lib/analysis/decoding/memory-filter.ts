import { normalise } from './normalise';
import type { Walk } from './random-walk';

/** A decoder that remembers: the belief of the window before, carried on, is the next prior. */
export interface MemoryFilter {
	/**
	 * Takes one window and gives the place with the largest belief (lowest index in a tie).
	 * @param logLikelihood over places, without prior
	 * @param walk          carries the belief from the window before; null begins anew from the prior
	 */
	readonly step: (logLikelihood: Float64Array, walk: Walk | null) => number;
	/** Belief after the last step, sum 1; the array is reused. */
	readonly belief: Float64Array;
	/** ln-likelihood of all windows since the beginning, without the constants left out of each. */
	readonly logLikelihood: () => number;
}

/**
 * Recursive (forward, causal) filter of a hidden random walk (Brown et al. 1998), scaled per step:
 * belief ∝ likelihood · Σ belief before · A.
 * @param logPrior over places
 */
export function memoryFilter(logPrior: Float64Array): MemoryFilter {
	const places = logPrior.length;
	const belief = new Float64Array(places);
	const logWeights = new Float64Array(places);
	let logTotal = 0;
	return {
		belief,
		logLikelihood: () => logTotal,
		step: (logLikelihood, walk) => {
			if (walk) {
				walk(belief);
				for (let p = 0; p < places; p++) logWeights[p] = Math.log(belief[p]) + logLikelihood[p];
			} else {
				logTotal = 0;
				for (let p = 0; p < places; p++) logWeights[p] = logPrior[p] + logLikelihood[p];
			}
			const found = normalise(logWeights, belief);
			logTotal += found.logTotal;
			return found.best;
		}
	};
}
