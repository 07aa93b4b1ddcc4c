import { peakBin } from '../maps/peak';
import { pearson } from '../statistics/pearson';
import { rowAt, type MatchedMaps } from './matched-maps';

/** With fewer units a vector says nothing; from ten on it can be trusted. */
const LEAST_UNITS = 5;
const TRUSTED_UNITS = 10;

/** Rates as they are, or each map divided by its own peak; said with every figure. */
export type VectorScale = 'raw' | 'peak-normalised';

/** How alike the whole population fires at the same places on two days. */
export interface PopulationVectors {
	readonly scale: VectorScale;
	/** Correlation across units for each bin; NaN with under five units defined in it on both days. */
	readonly byBin: Float64Array;
	/** Mean of the defined bins, NaN when there is none. */
	readonly mean: number;
	/** Ten units or more. */
	readonly isTrusted: boolean;
}

/**
 * Population-vector correlation: for each bin the Pearson correlation, across units, of their rates
 * on the two days, then the plain mean over bins (Leutgeb et al. 2005). The units must be one cell each on
 * both days, so only matched maps are taken. A unit that never fires has no peak and is left out of
 * peak-normalised vectors.
 * Cost: O(units · bins).
 */
export function populationVectors(
	{ earlierHz, laterHz, units, bins }: MatchedMaps,
	scale: VectorScale = 'raw'
): PopulationVectors {
	const a = scale === 'raw' ? earlierHz : byPeak(earlierHz, units, bins);
	const b = scale === 'raw' ? laterHz : byPeak(laterHz, units, bins);
	const vectorA = new Float64Array(units);
	const vectorB = new Float64Array(units);
	const byBin = new Float64Array(bins);
	let sum = 0;
	let defined = 0;
	for (let k = 0; k < bins; k++) {
		let both = 0;
		for (let u = 0; u < units; u++) {
			vectorA[u] = a[u * bins + k];
			vectorB[u] = b[u * bins + k];
			if (!Number.isNaN(vectorA[u] + vectorB[u])) both++;
		}
		byBin[k] = both >= LEAST_UNITS ? pearson(vectorA, vectorB) : NaN;
		if (Number.isNaN(byBin[k])) continue;
		sum += byBin[k];
		defined++;
	}
	const mean = defined > 0 ? sum / defined : NaN;
	return { scale, byBin, mean, isTrusted: units >= TRUSTED_UNITS };
}

function byPeak(ratesHz: Float64Array, units: number, bins: number): Float64Array {
	const out = ratesHz.slice();
	for (let u = 0; u < units; u++) {
		const map = rowAt(out, bins, u);
		const peak = peakBin(map);
		const peakHz = peak < 0 ? NaN : map[peak];
		for (let k = 0; k < bins; k++) map[k] /= peakHz;
	}
	return out;
}
