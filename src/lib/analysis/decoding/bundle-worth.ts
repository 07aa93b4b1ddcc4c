import type { Fold } from './folds';
import { addSpikeEvidence } from './log-likelihood';
import { normaliserOfDifference } from './normalise';
import type { RateModel } from './rate-model';
import type { WindowCounts } from './window-counts';

/** Decoding with one bundle left out, window by window. */
export interface Without {
	/** Windows looked at, ascending. */
	readonly window: Int32Array;
	/** Answer without the bundle: [bundle][looked-at window]. */
	readonly bin: readonly Int32Array[];
	/** log₂ posterior at the true bin with all units minus without the bundle; NaN unscorable. */
	readonly bits: readonly Float64Array[];
}

/** Largest number of (window, place, bundle or spiking unit) steps; beyond it every k-th window is used. */
const MOST_STEPS = 2e8;

/** The windows that a repeated decoding looks at: all, or evenly spaced ones when that costs too much. */
export function everyWindow(windows: number, stepsPerWindow: number): Int32Array {
	const every = Math.max(1, Math.ceil((windows * stepsPerWindow) / MOST_STEPS));
	return Int32Array.from({ length: Math.ceil(windows / every) }, (_, k) => k * every);
}

/**
 * Decodes without each bundle in turn, same folds and maps. The evidence of a window is a sum over
 * bundles, so leaving one out is a subtraction. Bundles that tell the same share the credit: the
 * figures do not add up.
 * @param bundleOf bundle of each decoding unit, −1 for none
 * @param looked   windows to look at
 */
export function decodeWithoutBundles(
	models: readonly (RateModel | null)[],
	folds: readonly Fold[],
	counts: WindowCounts,
	windowS: number,
	trueBin: Int32Array,
	bundleOf: Int32Array,
	bundles: number,
	looked: Int32Array
): Without {
	const bin = Array.from({ length: bundles }, () => new Int32Array(looked.length).fill(-1));
	const bits = Array.from({ length: bundles }, () => new Float64Array(looked.length).fill(NaN));
	const grouped = groupByBundle(counts, bundleOf, bundles, looked);
	let k = 0;
	folds.forEach((fold, f) => {
		const model = models[f];
		if (!model) {
			while (k < looked.length && looked[k] < fold.to) k++;
			return;
		}
		const parts = bundleTotals(model, bundleOf, bundles, windowS);
		const own = parts.map((part) => part.slice());
		const all = new Float64Array(model.bin.length);
		const nothing = new Float64Array(model.bin.length);
		for (; k < looked.length && looked[k] < fold.to; k++) {
			all.set(model.logPrior);
			own.forEach((evidence, b) => {
				const cell = k * (bundles + 1) + b;
				const { first, unit, spikes } = grouped;
				evidence.set(parts[b]);
				addSpikeEvidence(evidence, model, unit, spikes, first[cell], first[cell + 1]);
				for (let p = 0; p < all.length; p++) all[p] += evidence[p];
			});
			const place = model.placeOfBin[trueBin[looked[k]]];
			const logAll = place < 0 ? NaN : all[place] - normaliserOfDifference(all, nothing).logTotal;
			for (let b = 0; b < bundles; b++) {
				const { best, logTotal } = normaliserOfDifference(all, own[b]);
				const logWithout = place < 0 ? NaN : all[place] - own[b][place] - logTotal;
				bin[b][k] = model.bin[best];
				bits[b][k] = (logAll - logWithout) * Math.LOG2E;
			}
		}
	});
	return { window: looked, bin, bits };
}

/** Silent evidence −τ Σ f of each bundle; the last row is that of units without a bundle. */
function bundleTotals(
	model: RateModel,
	bundleOf: Int32Array,
	bundles: number,
	windowS: number
): Float64Array[] {
	const places = model.bin.length;
	const parts = Array.from({ length: bundles + 1 }, () => new Float64Array(places));
	for (let u = 0; u < model.units; u++) {
		const part = parts[bundleOf[u] < 0 ? bundles : bundleOf[u]];
		for (let p = 0; p < places; p++) part[p] -= windowS * model.ratesHz[u * places + p];
	}
	return parts;
}

/** The entries of the looked-at windows, ordered by window and then by bundle. */
function groupByBundle(
	counts: WindowCounts,
	bundleOf: Int32Array,
	bundles: number,
	looked: Int32Array
): WindowCounts {
	const cells = looked.length * (bundles + 1);
	const first = new Int32Array(cells + 1);
	const cellOf = (k: number, e: number) => {
		const bundle = bundleOf[counts.unit[e]];
		return k * (bundles + 1) + (bundle < 0 ? bundles : bundle);
	};
	const each = (visit: (cell: number, e: number) => void) => {
		for (let k = 0; k < looked.length; k++) {
			const w = looked[k];
			for (let e = counts.first[w]; e < counts.first[w + 1]; e++) visit(cellOf(k, e), e);
		}
	};
	each((cell) => first[cell + 1]++);
	for (let cell = 0; cell < cells; cell++) first[cell + 1] += first[cell];
	const next = first.slice();
	const unit = new Int32Array(first[cells]);
	const spikes = new Float64Array(first[cells]);
	each((cell, e) => {
		unit[next[cell]] = counts.unit[e];
		spikes[next[cell]++] = counts.spikes[e];
	});
	return { first, unit, spikes };
}
