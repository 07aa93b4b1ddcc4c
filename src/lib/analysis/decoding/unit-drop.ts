import type { Fold } from './folds';
import { addSpikeEvidence } from './log-likelihood';
import type { RateModel } from './rate-model';
import type { WindowCounts } from './window-counts';

/** Sizes of the subsets: 1, 2, 4, … and all. */
export function subsetSizes(units: number): number[] {
	const sizes: number[] = [];
	for (let size = 1; size < units; size *= 2) sizes.push(size);
	return [...sizes, units];
}

/**
 * Decodes with random subsets of the units, same folds and maps. One random order of the units is
 * walked per repetition and read off at each size, so a repetition costs one decoding in all; each
 * subset by itself is a fair draw.
 * @param order  all decoding units in random order
 * @param sizes  ascending, the last at most the number of units
 * @param looked windows to look at
 * @returns answered bin, [size][looked-at window]; −1 where a fold has no model
 */
export function decodeSubsets(
	models: readonly (RateModel | null)[],
	folds: readonly Fold[],
	counts: WindowCounts,
	windowS: number,
	order: Int32Array,
	sizes: readonly number[],
	looked: Int32Array
): Int32Array[] {
	const answers = sizes.map(() => new Int32Array(looked.length).fill(-1));
	const stepOfUnit = new Int32Array(order.length);
	order.forEach((unit, rank) => (stepOfUnit[unit] = sizes.findIndex((size) => rank < size)));
	let k = 0;
	folds.forEach((fold, f) => {
		const model = models[f];
		const silent = model ? silentEvidence(model, stepOfUnit, sizes.length, windowS) : [];
		const evidence = new Float64Array(model?.bin.length ?? 0);
		for (; k < looked.length && looked[k] < fold.to; k++) {
			if (!model) continue;
			const from = counts.first[looked[k]];
			const to = counts.first[looked[k] + 1];
			const { unit, spikes, first } = sorted(counts, from, to, stepOfUnit, sizes.length);
			evidence.set(model.logPrior);
			for (let s = 0; s < sizes.length; s++) {
				addSpikeEvidence(evidence, model, unit, spikes, first[s], first[s + 1]);
				answers[s][k] = model.bin[bestPlace(evidence, silent[s])];
			}
		}
	});
	return answers;
}

function bestPlace(evidence: Float64Array, silent: Float64Array): number {
	let best = 0;
	let top = -Infinity;
	for (let p = 0; p < evidence.length; p++) {
		const value = evidence[p] + silent[p];
		if (value > top) {
			top = value;
			best = p;
		}
	}
	return best;
}

/** −τ Σ f over the units of each subset. */
function silentEvidence(
	model: RateModel,
	stepOfUnit: Int32Array,
	steps: number,
	windowS: number
): Float64Array[] {
	const places = model.bin.length;
	const out = Array.from({ length: steps }, () => new Float64Array(places));
	for (let u = 0; u < model.units; u++) {
		if (stepOfUnit[u] < 0) continue;
		const part = out[stepOfUnit[u]];
		for (let p = 0; p < places; p++) part[p] -= windowS * model.ratesHz[u * places + p];
	}
	for (let s = 1; s < steps; s++) for (let p = 0; p < places; p++) out[s][p] += out[s - 1][p];
	return out;
}

/** The entries of one window ordered by the first subset that holds their unit. */
function sorted(
	counts: WindowCounts,
	from: number,
	to: number,
	stepOfUnit: Int32Array,
	steps: number
): WindowCounts {
	const first = new Int32Array(steps + 1);
	for (let e = from; e < to; e++) first[stepOfUnit[counts.unit[e]] + 1]++;
	for (let s = 0; s < steps; s++) first[s + 1] += first[s];
	const next = first.slice();
	const unit = new Int32Array(to - from);
	const spikes = new Float64Array(to - from);
	for (let e = from; e < to; e++) {
		const at = next[stepOfUnit[counts.unit[e]]]++;
		unit[at] = counts.unit[e];
		spikes[at] = counts.spikes[e];
	}
	return { first, unit, spikes };
}
