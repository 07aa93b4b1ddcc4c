import { rateMapper } from '../maps/rate-map';
import type { Smoother } from '../maps/smoother';
import { median } from '../statistics/quantile';
import { evidenceRows } from './evidence-rows';
import type { Fold } from './folds';
import { rateModel, type Prior, type RateModel } from './rate-model';
import type { WindowCounts } from './window-counts';

/** A decoding that can be made again with spikes and places shifted against each other. */
export interface RefitInput {
	readonly counts: WindowCounts;
	readonly units: number;
	readonly windowS: number;
	/** Bin of the arena of each window. */
	readonly trueBin: Int32Array;
	readonly folds: readonly Fold[];
	readonly bins: number;
	readonly smooth: Smoother;
	readonly minOccupancyS: number;
	readonly prior: Prior;
	/** Distance in cm between the centre of a bin and the place in a window. */
	readonly errorCm: (bin: number, window: number) => number;
}

/** Chance level by refitting. */
export interface RefitChance {
	/** Median error of each shift, cm; NaN where nothing could be answered. */
	readonly mediansCm: Float64Array;
	readonly medianCm: number;
	/** (b + 1)/(m + 1), b = shifts whose median error is at most the observed one; never 0. */
	readonly p: number;
}

/**
 * Chance level when the whole decoding is fitted anew with the spikes moved along the kept windows,
 * wrapping at the end: path, bursts and cells that fire together stay as they are, only their link to
 * place goes. Maps are made from whole windows (spikes and time of a window at its middle's place).
 * @param observedCm median error of the decoding itself, NaN for none
 * @param shifts     in windows, at least 200 of them at 20 s or more from no shift (`drawShifts`)
 * @returns p is NaN without shifts or without an observed error
 * Cost: one decoding per shift.
 */
export function refitChance(
	input: RefitInput,
	observedCm: number,
	shifts: ArrayLike<number>
): RefitChance {
	const mediansCm = Float64Array.from(shifts, (shift) => shiftedMedian(input, shift));
	let atMost = 0;
	for (const value of mediansCm) if (value <= observedCm) atMost++;
	const isTested = shifts.length > 0 && Number.isFinite(observedCm);
	return {
		mediansCm,
		medianCm: median(mediansCm),
		p: isTested ? (atMost + 1) / (shifts.length + 1) : NaN
	};
}

function shiftedMedian(input: RefitInput, shift: number): number {
	const count = input.trueBin.length;
	const at = (w: number) => (w + shift) % count;
	const errors = new Float64Array(count).fill(NaN);
	for (const fold of input.folds) {
		const model = modelWithout(input, fold, at);
		if (!model) continue;
		const places = model.bin.length;
		const rows = evidenceRows(model, input.counts, input.windowS, fold.from, fold.to);
		for (let w = fold.from; w < fold.to; w++) {
			const row = (w - fold.from) * places;
			let best = 0;
			let top = -Infinity;
			for (let p = 0; p < places; p++) {
				const value = rows[row + p] + model.logPrior[p];
				if (value > top) {
					top = value;
					best = p;
				}
			}
			errors[w] = input.errorCm(model.bin[best], at(w));
		}
	}
	return median(errors);
}

/** Maps from the windows outside a fold, each with the place of another window. */
function modelWithout(
	{ counts, units, windowS, trueBin, bins, smooth, minOccupancyS, prior }: RefitInput,
	fold: Fold,
	at: (window: number) => number
): RateModel | null {
	const occupancyS = new Float64Array(bins);
	const spikes = new Float64Array(units * bins);
	for (let w = 0; w < trueBin.length; w++) {
		if (w >= fold.from && w < fold.to) continue;
		const bin = trueBin[at(w)];
		occupancyS[bin] += windowS;
		for (let e = counts.first[w]; e < counts.first[w + 1]; e++) {
			spikes[counts.unit[e] * bins + bin] += counts.spikes[e];
		}
	}
	const toRates = rateMapper(occupancyS, smooth, minOccupancyS);
	const ratesHz = new Float64Array(units * bins);
	for (let u = 0; u < units; u++) {
		const row = u * bins;
		toRates(spikes.subarray(row, row + bins), ratesHz.subarray(row, row + bins));
	}
	return rateModel(ratesHz, occupancyS, (k) => occupancyS[k] >= minOccupancyS, prior);
}
