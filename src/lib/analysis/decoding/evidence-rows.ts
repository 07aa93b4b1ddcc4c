import { addSpikeEvidence } from './log-likelihood';
import type { RateModel } from './rate-model';
import type { WindowCounts } from './window-counts';

/**
 * Evidence of windows from … to − 1 over the model's places: Σ n ln f(x) − τ Σ f(x), without prior
 * and without the constants Σ n ln τ − ln n!.
 * @returns row-major [window][place]
 * Cost: O(spiking units · places) per window.
 */
export function evidenceRows(
	model: RateModel,
	counts: WindowCounts,
	windowS: number,
	from: number,
	to: number
): Float64Array {
	const places = model.bin.length;
	const out = new Float64Array((to - from) * places);
	for (let w = from; w < to; w++) {
		const row = out.subarray((w - from) * places, (w - from + 1) * places);
		for (let p = 0; p < places; p++) row[p] = -windowS * model.totalHz[p];
		addSpikeEvidence(row, model, counts.unit, counts.spikes, counts.first[w], counts.first[w + 1]);
	}
	return out;
}
