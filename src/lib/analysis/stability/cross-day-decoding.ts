import { chanceMedian } from '../decoding/chance';
import { decodeWindows, type Decoded } from '../decoding/decode-windows';
import { errorSummary, type ErrorSummary } from '../decoding/error-summary';
import { foldModels } from '../decoding/fold-models';
import type { Fold } from '../decoding/folds';
import { posteriorStore } from '../decoding/posterior-store';
import { rateModel, type Prior, type RateModel } from '../decoding/rate-model';
import { windowCounts } from '../decoding/window-counts';
import type { Windows } from '../decoding/windows';
import { unitMaps, type MapInput } from '../maps/unit-maps';

/** One day of matched units, ready to be mapped and decoded. Units stand in the same order on every day. */
export interface DecodableDay {
	readonly map: MapInput;
	readonly tS: Float64Array;
	readonly isUsed: Uint8Array;
	/** Position sample of each spike, −1 for none, for each unit. */
	readonly samples: readonly Int32Array[];
	/** Spike times of each unit, s, ascending. */
	readonly spikeS: readonly Float64Array[];
	readonly windows: Windows;
	readonly folds: readonly Fold[];
	/** Distance in cm between a bin's centre and where the animal is at a window's middle. */
	readonly errorCm: (bin: number, window: number) => number;
}

/** Decoding a day with the maps of an earlier one, beside decoding it with its own. */
export interface CrossDayDecoding {
	readonly units: number;
	readonly windows: number;
	/** With the maps of the earlier day. */
	readonly cross: ErrorSummary;
	/** With maps of the same day from outside each fold, the same units and windows. */
	readonly within: ErrorSummary;
	/** Median error across over median error within; about 1: the code held. */
	readonly ratio: number;
	/** Median error of the cross-day answers at the wrong times. */
	readonly chanceMedianCm: number;
	/** Windows whose place the earlier maps cannot answer; they stay in the distance errors. */
	readonly unscorable: number;
}

/**
 * Tests the maps of one day on the windows of another. Both scores take the same matched units and the
 * same windows, so that their ratio is about the code and not about who was recorded. Rising with
 * the lag: drift; high already after one day with sure matches: remapping.
 * @param earlier same arena, bins and smoothing as `later`
 * @returns figures are NaN without units, windows or a place to answer
 * @throws RangeError the days have different numbers of units or bins
 */
export function crossDayDecoding(
	earlier: DecodableDay,
	later: DecodableDay,
	prior: Prior
): CrossDayDecoding {
	const units = later.samples.length;
	if (earlier.samples.length !== units || later.spikeS.length !== units) {
		throw new RangeError('both days need the same matched units');
	}
	if (earlier.map.bins !== later.map.bins) throw new RangeError('both days need the same bins');
	const windows = later.windows.startS.length;
	const whole: Fold = { from: 0, to: windows, startS: NaN, stopS: NaN };
	const { map, tS, isUsed, samples, folds } = later;
	const own = units === 0 ? [] : foldModels(map, tS, isUsed, samples, folds, prior);
	const across = answers(later, [whole], [units === 0 ? null : modelOf(earlier, prior)]);
	const within = answers(later, folds, own);
	const { errorCm } = later;
	const cross = errorSummary(errors(across.bin, errorCm));
	const ownErrors = errorSummary(errors(within.bin, errorCm));
	const isAnswered = across.bin.every((bin) => bin >= 0);
	return {
		units,
		windows,
		cross,
		within: ownErrors,
		ratio: cross.medianCm / ownErrors.medianCm,
		chanceMedianCm: isAnswered
			? chanceMedian(windows, (answered, at) => errorCm(across.bin[answered], at))
			: NaN,
		unscorable: across.log2AtTrue.filter((bits) => Number.isNaN(bits)).length
	};
}

function modelOf({ map, samples, isUsed }: DecodableDay, prior: Prior): RateModel | null {
	const { occupancyS, ratesHz } = unitMaps(map, samples, isUsed);
	return rateModel(ratesHz, occupancyS, (bin) => occupancyS[bin] >= map.minOccupancyS, prior);
}

function answers(
	{ map, spikeS, windows }: DecodableDay,
	folds: readonly Fold[],
	models: readonly (RateModel | null)[]
): Decoded {
	const count = windows.startS.length;
	const decoded: Decoded = {
		bin: new Int32Array(count).fill(-1),
		log2AtTrue: new Float64Array(count).fill(NaN),
		isCovered: new Uint8Array(count)
	};
	const counts = windowCounts(windows, spikeS);
	const trueBin = Int32Array.from(windows.sample, (i) => map.bin[i]);
	const store = posteriorStore(count, map.bins);
	folds.forEach((fold, f) => {
		const model = models[f];
		if (!model) return;
		decodeWindows(model, fold, counts, windows.lengthS, trueBin, decoded, store, () => undefined);
	});
	return decoded;
}

/** Errors of all windows; none at all when one has no answer, so that no score stands on a part of them. */
function errors(bin: Int32Array, errorCm: (bin: number, window: number) => number): Float64Array {
	return bin.includes(-1) ? new Float64Array(0) : Float64Array.from(bin, errorCm);
}
