import type { Transition } from './transition';

/** The single path that explains all windows best; offline, like everything that looks ahead. */
export interface MostProbablePath {
	readonly use: 'offline';
	/** Place in every window. */
	readonly place: Int32Array;
	/** ln P(path and all windows), without the constants left out of each window's evidence. */
	readonly logJoint: number;
}

/**
 * Most probable path of a hidden walk (Viterbi; Rabiner 1989). In a tie the lower place, decided at
 * the last window first.
 * @param logPrior      over places
 * @param logLikelihood row-major [window][place]
 * @param steps         how the walk came to each window; null begins anew from the prior
 * @throws RangeError lengths do not fit
 * Cost: O(windows) steps and windows · places whole numbers.
 */
export function mostProbablePath(
	logPrior: Float64Array,
	logLikelihood: Float64Array,
	steps: readonly (Transition | null)[]
): MostProbablePath {
	const places = logPrior.length;
	const windows = steps.length;
	if (logLikelihood.length !== windows * places) {
		throw new RangeError(
			`${logLikelihood.length} numbers of evidence for ${windows} windows of ${places} places`
		);
	}
	const from = new Int32Array(windows * places);
	const place = new Int32Array(windows);
	const score = new Float64Array(places);
	let logJoint = 0;
	for (let t = 0; t < windows; t++) {
		const step = t === 0 ? null : steps[t];
		if (step) step.best(score, from.subarray(t * places, (t + 1) * places));
		else score.set(logPrior);
		for (let p = 0; p < places; p++) score[p] += logLikelihood[t * places + p];
		if (t + 1 < windows && steps[t + 1]) continue;
		let best = 0;
		for (let p = 1; p < places; p++) if (score[p] > score[best]) best = p;
		logJoint += score[best];
		place[t] = best;
		for (let s = t; s > 0 && steps[s]; s--) place[s - 1] = from[s * places + place[s]];
	}
	return { use: 'offline', place, logJoint };
}
