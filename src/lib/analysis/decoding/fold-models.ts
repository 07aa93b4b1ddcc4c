import { unitMaps, type MapInput } from '../maps/unit-maps';
import type { Fold } from './folds';
import { rateModel, type Prior, type RateModel } from './rate-model';

/**
 * The model of each fold: maps and prior from the samples that count and lie outside its span.
 * @param samples position sample of each spike, for each unit that decodes
 * @returns null for a fold whose training data leave no place to answer
 */
export function foldModels(
	input: MapInput,
	tS: Float64Array,
	isUsed: Uint8Array,
	samples: readonly Int32Array[],
	folds: readonly Fold[],
	prior: Prior
): (RateModel | null)[] {
	return folds.map(({ startS, stopS }) => {
		const isTraining = isUsed.map((used, i) => (tS[i] >= startS && tS[i] < stopS ? 0 : used));
		const { occupancyS, ratesHz } = unitMaps(input, samples, isTraining);
		const isDefined = (bin: number) => occupancyS[bin] >= input.minOccupancyS;
		return rateModel(ratesHz, occupancyS, isDefined, prior);
	});
}
