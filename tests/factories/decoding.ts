import { decodeWindows, type Decoded } from '../../src/lib/analysis/decoding/decode-windows';
import { evidenceRows } from '../../src/lib/analysis/decoding/evidence-rows';
import { normalise } from '../../src/lib/analysis/decoding/normalise';
import { posteriorStore } from '../../src/lib/analysis/decoding/posterior-store';
import { rateModel, type Prior, type RateModel } from '../../src/lib/analysis/decoding/rate-model';
import type { WindowCounts } from '../../src/lib/analysis/decoding/window-counts';

/** Counts per window and unit, stored as the decoder reads them. */
export function sparse(counts: readonly (readonly number[])[]): WindowCounts {
	const first = [0];
	const unit: number[] = [];
	const spikes: number[] = [];
	for (const row of counts) {
		row.forEach((n, u) => {
			if (n === 0) return;
			unit.push(u);
			spikes.push(n);
		});
		first.push(unit.length);
	}
	return {
		first: Int32Array.from(first),
		unit: Int32Array.from(unit),
		spikes: Float64Array.from(spikes)
	};
}

/** A model of rates [unit][bin], every bin defined. */
export function modelOf(
	rates: readonly (readonly number[])[],
	occupancyS: readonly number[],
	prior: Prior | Float64Array = 'even'
): RateModel {
	const model = rateModel(
		Float64Array.from(rates.flat()),
		Float64Array.from(occupancyS),
		() => true,
		prior
	);
	if (!model) throw new Error('no place to answer');
	return model;
}

/** Everything the decoder gives for a list of windows. */
export function decodeAll(
	model: RateModel,
	counts: readonly (readonly number[])[],
	tauS: number,
	bins: number,
	trueBin = counts.map(() => 0)
) {
	const out: Decoded = {
		bin: new Int32Array(counts.length),
		log2AtTrue: new Float64Array(counts.length),
		isCovered: new Uint8Array(counts.length)
	};
	const store = posteriorStore(counts.length, bins);
	const evidence: Float64Array[] = [];
	const fold = { from: 0, to: counts.length, startS: 0, stopS: 0 };
	decodeWindows(model, fold, sparse(counts), tauS, Int32Array.from(trueBin), out, store, (_, e) =>
		evidence.push(e.slice())
	);
	return { ...out, store, evidence };
}

/** Posteriors over all bins of the arena in double precision, one array per window. */
export function posteriorsOf(
	model: RateModel,
	counts: readonly (readonly number[])[],
	tauS: number
): Float64Array[] {
	const places = model.bin.length;
	const rows = evidenceRows(model, sparse(counts), tauS, 0, counts.length);
	return counts.map((_, w) => {
		const weights = rows
			.subarray(w * places, (w + 1) * places)
			.map((e, p) => e + model.logPrior[p]);
		const posterior = new Float64Array(places);
		normalise(weights, posterior);
		const out = new Float64Array(model.placeOfBin.length);
		model.bin.forEach((k, p) => (out[k] = posterior[p]));
		return out;
	});
}
