import type { Bins } from '../arena/bins';
import type { Metric } from '../arena/metric';
import { fisherMean } from '../statistics/fisher-mean';
import { mean } from '../statistics/mean';
import { median } from '../statistics/quantile';
import { mapCorrelation } from './map-correlation';
import { rowAt, type MatchedMaps } from './matched-maps';
import { peakShiftCm } from './peak-shift';
import { populationVectors, type PopulationVectors, type VectorScale } from './population-vectors';
import { rateChange } from './rate-change';

/** Two days compared by the units on both. */
export interface DayComparison {
	readonly lagDays: number;
	readonly units: number;
	/** Of each unit, in the order of the matched maps. */
	readonly mapR: Float64Array;
	readonly sharedBins: Int32Array;
	readonly peakShiftCm: Float64Array;
	readonly rateChange: Float64Array;
	readonly rateOverlap: Float64Array;
	/** Over units, by Fisher's transform. */
	readonly meanMapR: number;
	/** The same, units weighted by their bins − 3. */
	readonly weightedMapR: number;
	readonly populationVectors: PopulationVectors;
	readonly medianPeakShiftCm: number;
	readonly medianRateChange: number;
	readonly medianRateOverlap: number;
	/** Mean chance that a pair is one cell: the precision to expect. */
	readonly meanProbability: number;
}

/**
 * Map correlation, population vectors, shift of the peak and change of rate between two days.
 * @returns figures are NaN where undefined; means leave undefined units out
 */
export function compareDays(
	matched: MatchedMaps,
	bins: Bins,
	metric: Metric,
	scale: VectorScale = 'raw'
): DayComparison {
	const units = [...Array(matched.units).keys()].map((u) => {
		const a = rowAt(matched.earlierHz, matched.bins, u);
		const b = rowAt(matched.laterHz, matched.bins, u);
		const rate = rateChange(matched.earlierMeanHz[u], matched.laterMeanHz[u]);
		return { map: mapCorrelation(a, b), shiftCm: peakShiftCm(a, b, bins, metric), rate };
	});
	const mapR = Float64Array.from(units, ({ map }) => map.r);
	const sharedBins = Int32Array.from(units, ({ map }) => map.bins);
	const shiftCm = Float64Array.from(units, ({ shiftCm }) => shiftCm);
	const change = Float64Array.from(units, ({ rate }) => rate.change);
	const overlap = Float64Array.from(units, ({ rate }) => rate.overlap);
	return {
		lagDays: matched.lagDays,
		units: matched.units,
		mapR,
		sharedBins,
		peakShiftCm: shiftCm,
		rateChange: change,
		rateOverlap: overlap,
		meanMapR: fisherMean(mapR),
		weightedMapR: fisherMean(mapR, sharedBins),
		populationVectors: populationVectors(matched, scale),
		medianPeakShiftCm: median(shiftCm),
		medianRateChange: median(change),
		medianRateOverlap: median(overlap),
		meanProbability: mean(matched.probability)
	};
}
