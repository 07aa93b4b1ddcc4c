/** How the prior weighs places by itself: all visited ones alike, or by the time spent there. */
export type Prior = 'even' | 'time-spent';

/** A rate never falls below this, so that one stray spike cannot veto a place. */
export const LEAST_RATE_HZ = 0.01;

/**
 * What a decoder knows: rates of every unit over the places that may be answered. `bin` lists those
 * places (bins of the arena, ascending); the other arrays are indexed by position in that list.
 */
export interface RateModel {
	readonly units: number;
	readonly bin: Int32Array;
	/** Position in `bin` of each bin of the arena, −1 where the prior is zero. */
	readonly placeOfBin: Int32Array;
	/** Row-major [unit][place], Hz, floored. */
	readonly ratesHz: Float64Array;
	/** Natural logarithm of the same. */
	readonly logRates: Float64Array;
	/** Sum over units, Hz per place. */
	readonly totalHz: Float64Array;
	readonly logPrior: Float64Array;
}

/**
 * Builds a model from maps.
 * @param ratesHz    [unit][bin] row-major, NaN where undefined (the same bins for every unit); empty
 *   for no units, whose posterior is the prior
 * @param occupancyS seconds per bin; a bin with NaN rate or no dwell cannot be answered
 * @param prior      or a weight for every bin, such as one that a person drew: it need not sum to one,
 *   a bin of weight 0 cannot be answered, and neither can an unvisited one, whatever its weight
 * @returns null when no bin can be answered
 * @throws RangeError a given prior has another length, a negative or non-finite weight, or only zeros
 */
export function rateModel(
	ratesHz: Float64Array,
	occupancyS: Float64Array,
	isDefined: (bin: number) => boolean,
	prior: Prior | Float64Array
): RateModel | null {
	const bins = occupancyS.length;
	const units = ratesHz.length / bins;
	const weights = priorWeights(prior, occupancyS);
	const bin = Int32Array.from(occupancyS.keys()).filter(
		(k) => isDefined(k) && occupancyS[k] > 0 && weights[k] > 0
	);
	const places = bin.length;
	if (places === 0) return null;
	const placeOfBin = new Int32Array(bins).fill(-1);
	bin.forEach((k, place) => (placeOfBin[k] = place));
	const kept = new Float64Array(units * places);
	const totalHz = new Float64Array(places);
	for (let u = 0; u < units; u++) {
		for (let p = 0; p < places; p++) {
			const rate = Math.max(LEAST_RATE_HZ, ratesHz[u * bins + bin[p]]);
			kept[u * places + p] = rate;
			totalHz[p] += rate;
		}
	}
	const total = bin.reduce((sum, k) => sum + weights[k], 0);
	return {
		units,
		bin,
		placeOfBin,
		ratesHz: kept,
		logRates: kept.map(Math.log),
		totalHz,
		logPrior: Float64Array.from(bin, (k) =>
			prior === 'even' ? -Math.log(places) : Math.log(weights[k] / total)
		)
	};
}

/** Weight of every bin, before those that cannot be answered are left out. */
function priorWeights(prior: Prior | Float64Array, occupancyS: Float64Array): Float64Array {
	if (prior === 'time-spent') return occupancyS;
	if (prior === 'even') return new Float64Array(occupancyS.length).fill(1);
	if (prior.length !== occupancyS.length) {
		throw new RangeError(`a prior of ${prior.length} bins for an arena of ${occupancyS.length}`);
	}
	const odd = prior.findIndex((weight) => !(weight >= 0 && Number.isFinite(weight)));
	if (odd >= 0) throw new RangeError(`the prior of bin ${odd} is ${prior[odd]}`);
	if (!prior.some((weight) => weight > 0)) throw new RangeError('the prior is zero everywhere');
	return prior;
}
