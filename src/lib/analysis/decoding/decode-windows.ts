import { blockEvidence, type BlockEvidence } from './block-evidence';
import { isInCredibleSet } from './credible-set';
import type { Fold } from './folds';
import { normalise } from './normalise';
import { rowOf, type PosteriorStore } from './posterior-store';
import type { RateModel } from './rate-model';
import type { WindowCounts } from './window-counts';

/** Answer of a decoder for every window. */
export interface Decoded {
	/** Bin with the largest posterior. */
	readonly bin: Int32Array;
	/** log₂ posterior at the true bin; NaN where that bin cannot be answered. */
	readonly log2AtTrue: Float64Array;
	/** 1 where the true bin lies in the 95 % highest-probability set. */
	readonly isCovered: Uint8Array;
}

/**
 * Position from spikes, each window by itself (Zhang et al. 1998):
 * ln P(x | n) = ln P(x) + Σ n ln f(x) − τ Σ f(x) + const, normalised in logs. A window without
 * spikes is evidence too. Decodes the windows of one fold with that fold's model.
 * @param trueBin bin of each window
 * @param out     filled for the windows of the fold
 * @param eachEvidence sees, per window, ln-likelihood (without prior) over the model's places
 * @param evidenceOf  the same for all folds spares room
 * Cost: O(spiking units · places) per window.
 */
export function decodeWindows(
	model: RateModel,
	fold: Fold,
	counts: WindowCounts,
	windowS: number,
	trueBin: Int32Array,
	out: Decoded,
	store: PosteriorStore,
	eachEvidence: (window: number, logLikelihood: Float64Array) => void,
	evidenceOf: BlockEvidence = blockEvidence()
): void {
	const places = model.bin.length;
	const logWeights = new Float64Array(places);
	const posterior = new Float64Array(places);
	evidenceOf(model, counts, windowS, fold.from, fold.to, (w, evidence) => {
		for (let p = 0; p < places; p++) logWeights[p] = evidence[p] + model.logPrior[p];
		const { best, logTotal } = normalise(logWeights, posterior);
		out.bin[w] = model.bin[best];
		const place = model.placeOfBin[trueBin[w]];
		out.log2AtTrue[w] = place < 0 ? NaN : (logWeights[place] - logTotal) * Math.LOG2E;
		out.isCovered[w] = place >= 0 && isInCredibleSet(posterior, place, 0.95) ? 1 : 0;
		const row = rowOf(store, w);
		if (row >= 0) {
			for (let p = 0; p < places; p++) {
				store.probabilities[row * store.bins + model.bin[p]] = posterior[p];
			}
		}
		eachEvidence(w, evidence);
	});
}
