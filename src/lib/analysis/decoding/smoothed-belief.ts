import { logSumExp } from '../statistics/log-sum-exp';
import type { Transition } from './transition';

/** Belief over places in every window of a stretch, row-major [window][place], rows sum to one. */
export interface SmoothedBelief {
	/** From all windows, those after it too: for looking back, never for what was known then. */
	readonly use: 'offline';
	readonly smoothed: Float64Array;
	/** From the window and those before it (causal). */
	readonly filtered: Float64Array;
	/** ln P(all windows), without the constants left out of each window's evidence. */
	readonly logLikelihood: number;
}

/**
 * Forward–backward recursion of a hidden walk (Rabiner 1989), in logarithms:
 * α₁ = P(x) L₁, α_t = L_t Σ α_{t−1} A; β_T = 1, β_t = Σ A L_{t+1} β_{t+1}; filtered ∝ α, smoothed ∝ α β.
 * @param logPrior      over places
 * @param logLikelihood ln L, row-major [window][place], any constant per window missing
 * @param steps         how the walk came to each window; null begins anew from the prior (always at
 *   the first, whatever is given there), and what is before and after tell nothing of each other
 * @throws RangeError lengths do not fit
 * Cost: O(windows) steps and 3 · windows · places numbers.
 */
export function smoothedBelief(
	logPrior: Float64Array,
	logLikelihood: Float64Array,
	steps: readonly (Transition | null)[]
): SmoothedBelief {
	const places = logPrior.length;
	const windows = steps.length;
	if (logLikelihood.length !== windows * places) {
		throw new RangeError(
			`${logLikelihood.length} numbers of evidence for ${windows} windows of ${places} places`
		);
	}
	const filtered = new Float64Array(windows * places);
	const belief = new Float64Array(places);
	let total = 0;
	for (let t = 0; t < windows; t++) {
		const step = t === 0 ? null : steps[t];
		if (step) step.forward(belief);
		else belief.set(logPrior);
		addRow(belief, logLikelihood, t);
		const logTotal = logSumExp(belief);
		for (let p = 0; p < places; p++) belief[p] -= logTotal;
		total += logTotal;
		filtered.set(belief, t * places);
	}
	const smoothed = new Float64Array(windows * places);
	const future = new Float64Array(places);
	for (let t = windows - 1; t >= 0; t--) {
		const next = t + 1 < windows ? steps[t + 1] : null;
		if (next) {
			addRow(future, logLikelihood, t + 1);
			next.backward(future);
			// Any constant may go: rows are normalised. Without this the sum would grow with the windows.
			const logTotal = logSumExp(future);
			for (let p = 0; p < places; p++) future[p] -= logTotal;
		} else future.fill(0);
		const row = smoothed.subarray(t * places, (t + 1) * places);
		row.set(future);
		addRow(row, filtered, t);
		const logTotal = logSumExp(row);
		for (let p = 0; p < places; p++) row[p] = Math.exp(row[p] - logTotal);
	}
	return { use: 'offline', smoothed, filtered: filtered.map(Math.exp), logLikelihood: total };
}

function addRow(to: Float64Array, rows: Float64Array, t: number): void {
	for (let p = 0, at = t * to.length; p < to.length; p++, at++) to[p] += rows[at];
}
