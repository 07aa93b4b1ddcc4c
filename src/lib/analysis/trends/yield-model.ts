import { binomialLogPmf } from '../statistics/binomial';
import { logSumExp } from '../statistics/log-sum-exp';
import { poissonLogPmf } from '../statistics/poisson';

/**
 * Units of a bundle from one day to the next: N = Binomial(N before, survival) + Poisson(arrivals),
 * an integer autoregression of order 1 (Al-Osh and Alzaid 1987). Its mean is
 * arrivals/(1 − survival), its autocorrelation at lag k survivalᵏ.
 */
export interface YieldModel {
	/** Chance that a unit is still there a day later, in (0, 1). */
	readonly survival: number;
	/** New units a day, > 0. */
	readonly arrivals: number;
}

/** Mean number of units in the long run. */
export function stationaryMean({ survival, arrivals }: YieldModel): number {
	return arrivals / (1 - survival);
}

/**
 * The model of one step over several days, the days between not recorded: survivalᵍ, and of those
 * who arrived in between, the ones still there: arrivals (1 − survivalᵍ)/(1 − survival).
 * @param days g, whole, ≥ 1
 * @throws RangeError days or the model out of range
 */
export function overGap(model: YieldModel, days: number): YieldModel {
	demandModel(model);
	if (!(Number.isInteger(days) && days >= 1)) throw new RangeError(`not a gap in days: ${days}`);
	if (days === 1) return model;
	const survival = model.survival ** days;
	return { survival, arrivals: (model.arrivals * (1 - survival)) / (1 - model.survival) };
}

/** Mean and variance of the next count, the last one known. */
export function nextCount(
	{ survival, arrivals }: YieldModel,
	previous: number
): { readonly mean: number; readonly variance: number } {
	return {
		mean: survival * previous + arrivals,
		variance: survival * (1 - survival) * previous + arrivals
	};
}

/**
 * ln P(next count = today), the last one known: binomial survivors plus Poisson newcomers, summed
 * over how many survived.
 * @param previous whole, ≥ 0
 * @returns −∞ when today is no count
 * @throws RangeError previous or the model out of range
 * Cost: O(min(previous, today)).
 */
export function nextCountLogPmf(model: YieldModel, previous: number, today: number): number {
	demandModel(model);
	if (!(Number.isInteger(today) && today >= 0)) return -Infinity;
	const terms = new Float64Array(Math.min(previous, today) + 1);
	for (let kept = 0; kept < terms.length; kept++) {
		terms[kept] =
			binomialLogPmf(kept, previous, model.survival) + poissonLogPmf(today - kept, model.arrivals);
	}
	return logSumExp(terms);
}

/** P(next count ≤ most), the last one known. Cost: O(most · min(previous, most)). */
export function nextCountAtMost(model: YieldModel, previous: number, most: number): number {
	let total = 0;
	for (let today = 0; today <= most; today++) {
		total += Math.exp(nextCountLogPmf(model, previous, today));
	}
	return Math.min(1, total);
}

/** @throws RangeError survival outside (0, 1), or arrivals not above 0 */
export function demandModel({ survival, arrivals }: YieldModel): void {
	if (!(survival > 0 && survival < 1 && arrivals > 0 && arrivals < Infinity)) {
		throw new RangeError(
			`survival must be in (0, 1), arrivals above 0: ${survival} and ${arrivals}`
		);
	}
}
