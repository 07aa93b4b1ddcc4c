import type { Bins } from '../arena/bins';
import { quantileSorted } from '../statistics/quantile';
import { fisherInformation } from './fisher-information';
import type { RateModel } from './rate-model';

/** Median of |z| for a standard normal error, and of the length of a plane one (√(2 ln 2)). */
const MEDIAN_ON_LINE = 0.6744897501960817;
const MEDIAN_IN_PLANE = Math.sqrt(2 * Math.log(2));

/**
 * Fisher information about position at one place, per cm² (Cramér–Rao): J = τ Σ f′²/f over
 * independent Poisson units. Slopes are differences between the two neighbours that can be answered,
 * one-sided at edges; where there is none J is 0. In the plane 1/J is the mean of the two axes' 1/J.
 */
export function informationAt(
	model: RateModel,
	bins: Bins,
	place: number,
	windowS: number
): number {
	const along = axisInformation(model, bins, place, windowS, 1, bins.binsX);
	if (bins.dimensions === 1) return along;
	const across = axisInformation(model, bins, place, windowS, bins.binsX, bins.binsY);
	return along > 0 && across > 0 ? 2 / (1 / along + 1 / across) : 0;
}

function axisInformation(
	model: RateModel,
	bins: Bins,
	place: number,
	windowS: number,
	stride: number,
	line: number
): number {
	const bin = model.bin[place];
	const k = stride === 1 ? bin % bins.binsX : Math.floor(bin / bins.binsX);
	const at = (step: number) => {
		const isInside = k + step >= 0 && k + step < line;
		if (!isInside && !bins.isRing) return -1;
		return model.placeOfBin[bin + (isInside ? step : -step * (line - 1)) * stride];
	};
	const before = at(-1) < 0 ? place : at(-1);
	const after = at(1) < 0 ? place : at(1);
	const stepCm = ((before === place ? 0 : 1) + (after === place ? 0 : 1)) * bins.binCm;
	if (stepCm === 0) return 0;
	const places = model.bin.length;
	const rates = new Float64Array(model.units);
	const slopes = new Float64Array(model.units);
	for (let u = 0; u < model.units; u++) {
		const row = u * places;
		rates[u] = model.ratesHz[row + place];
		slopes[u] = (model.ratesHz[row + after] - model.ratesHz[row + before]) / stepCm;
	}
	return fisherInformation(rates, slopes, windowS);
}

/**
 * The median error an unbiased decoder without memory could reach at best, cm: from the median over
 * windows of 1/J as if errors were normal. A guide: with few units the real error lies above it, a
 * decoder with a strong prior may dip below it in places.
 * @param bin true bin of each window
 * @returns NaN when in half the windows nothing can be told
 */
export function precisionLimitCm(
	model: RateModel,
	bins: Bins,
	bin: Int32Array,
	windowS: number
): number {
	const varianceAt = Float64Array.from(
		model.bin,
		(_, place) => 1 / informationAt(model, bins, place, windowS)
	);
	const sorted = Float64Array.from(bin, (k) =>
		model.placeOfBin[k] < 0 ? Infinity : varianceAt[model.placeOfBin[k]]
	).sort();
	const variance = quantileSorted(sorted, 0.5);
	if (!Number.isFinite(variance)) return NaN;
	return (bins.dimensions === 1 ? MEDIAN_ON_LINE : MEDIAN_IN_PLANE) * Math.sqrt(variance);
}
