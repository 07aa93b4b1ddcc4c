import type { Bins } from '../arena/bins';
import { placeFields, type FieldRule } from '../maps/fields';
import { information } from '../maps/information';
import { peakBin } from '../maps/peak';
import { figure, type FieldResult, type MapResult, type Place } from './result';

/** Where a bin lies. */
export function placeOf(bins: Bins, bin: number): Place {
	return [bins.centreXCm[bin], figure(bins.centreYCm[bin])];
}

/**
 * Puts one map into words and figures.
 * @param ratesHz    smoothed Hz per bin, NaN undefined
 * @param neighbours touching bins, without diagonals
 */
export function describeMap(
	bins: Bins,
	neighbours: readonly Int32Array[],
	rule: FieldRule,
	ratesHz: Float64Array,
	occupancyS: Float64Array,
	spikesUsed: number
): MapResult {
	const told = information(ratesHz, occupancyS);
	const peak = peakBin(ratesHz);
	const usedS = occupancyS.reduce((sum, seconds) => sum + seconds, 0);
	const isDefined = ratesHz.some(Number.isFinite);
	return {
		spikesUsed,
		meanRateHz: figure(spikesUsed / usedS),
		peakRateHz: isDefined ? (peak < 0 ? 0 : ratesHz[peak]) : null,
		peakCm: peak < 0 ? null : placeOf(bins, peak),
		informationBitsPerSpike: figure(told.bitsPerSpike),
		informationBitsPerS: figure(told.bitsPerS),
		sparsity: figure(told.sparsity),
		fields: placeFields(ratesHz, bins, neighbours, rule).map((field): FieldResult => ({
			peakRateHz: field.peakRateHz,
			peakCm: placeOf(bins, field.peakBin),
			centreCm: [field.centreXCm, figure(field.centreYCm)],
			sizeCm: bins.dimensions === 1 ? field.bins.length * bins.binCm : null,
			areaCm2: bins.dimensions === 2 ? field.bins.length * bins.binCm ** 2 : null
		})),
		ratesHzByBin: Array.from(ratesHz, figure)
	};
}
