import { newKernel, type Kernel } from '../kernel/kernel';
import { addSpikeEvidence } from './log-likelihood';
import type { RateModel } from './rate-model';
import { TILE } from './tiles';
import type { WindowCounts } from './window-counts';

/**
 * ln-likelihood of every place, −τ Σ f + Σ n ln f without the constants, for the windows
 * from … to − 1 in turn. The array handed to `each` is reused.
 */
export type BlockEvidence = (
	model: RateModel,
	counts: WindowCounts,
	windowS: number,
	from: number,
	to: number,
	each: (window: number, logLikelihood: Float64Array) => void
) => void;

/** Windows computed at a time: their evidence stays in the second fastest memory. */
const BLOCK = 32;

/** Evidence from the compiled kernel, else from `addSpikeEvidence`; equal up to rounding. */
export function blockEvidence(): BlockEvidence {
	const kernel = newKernel();
	return kernel ? compiledEvidence(kernel) : plainEvidence;
}

/** Evidence window by window. */
export const plainEvidence: BlockEvidence = (model, counts, windowS, from, to, each) => {
	const silent = model.totalHz.map((rate) => -windowS * rate);
	const evidence = new Float64Array(silent.length);
	const { first, unit, spikes } = counts;
	for (let w = from; w < to; w++) {
		evidence.set(silent);
		addSpikeEvidence(evidence, model, unit, spikes, first[w], first[w + 1]);
		each(w, evidence);
	}
};

function compiledEvidence(kernel: Kernel): BlockEvidence {
	return (model, counts, windowS, from, to, each) => {
		kernel.clear();
		const { units, logRates } = model;
		const places = model.bin.length;
		const tiles = Math.ceil(places / TILE);
		const room = tiles * TILE;
		const begin = counts.first[from];
		const table = kernel.take(8 * room * units);
		const silent = kernel.take(8 * room);
		const first = kernel.take(4 * (to - from + 1));
		const entries = kernel.take(8 * (counts.first[to] - begin));
		const out = kernel.take(8 * BLOCK * room);
		const rates = kernel.float64(table, room * units);
		for (let u = 0; u < units; u++) {
			for (let p = 0; p < places; p++) {
				rates[(p - (p % TILE)) * units + u * TILE + (p % TILE)] = logRates[u * places + p];
			}
		}
		kernel.float64(silent, places).set(model.totalHz.map((rate) => -windowS * rate));
		const starts = kernel.int32(first, to - from + 1);
		for (let w = from; w <= to; w++) starts[w - from] = counts.first[w] - begin;
		const unit = kernel.int32(entries, 2 * (counts.first[to] - begin));
		const spikes = kernel.float32(entries, unit.length);
		for (let e = begin; e < counts.first[to]; e++) {
			unit[2 * (e - begin)] = counts.unit[e];
			spikes[2 * (e - begin) + 1] = counts.spikes[e];
		}
		const rows = Array.from({ length: BLOCK }, (_, k) =>
			kernel.float64(out + 8 * k * room, places)
		);
		for (let w = from; w < to; w += BLOCK) {
			const windows = Math.min(BLOCK, to - w);
			kernel.call.evidence(
				...[first + 4 * (w - from), entries, windows, units, tiles, table, silent, out]
			);
			for (let k = 0; k < windows; k++) each(w + k, rows[k]);
		}
	};
}
