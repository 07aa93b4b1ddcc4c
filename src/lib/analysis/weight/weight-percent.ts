import { mean } from '../statistics/mean';

/** Days of free feeding that make a baseline (common practice). */
const BASELINE_DAYS = { least: 3, most: 5 } as const;

/**
 * Baseline weight: the mean over three to five days of free feeding.
 * @param weightsG one per day, without the implant's mass or all with it
 * @throws RangeError fewer or more days, or a weight not above 0
 */
export function baselineWeight(weightsG: readonly number[]): number {
	const { least, most } = BASELINE_DAYS;
	if (weightsG.length < least || weightsG.length > most) {
		throw new RangeError(`a baseline takes ${least} to ${most} days, got ${weightsG.length}`);
	}
	weightsG.forEach(demandAboveZero);
	return mean(weightsG);
}

/**
 * Weight in per cent of the baseline.
 * @throws RangeError a weight not above 0
 */
export function weightPercent(weightG: number, baselineG: number): number {
	demandAboveZero(weightG);
	demandAboveZero(baselineG);
	return (100 * weightG) / baselineG;
}

/**
 * Baseline of a growing animal on a later day: baseline · G(then) / G(at baseline), with G the growth
 * curve of its strain and sex, or the mean of its litter-mates. Show the percentage of both baselines.
 * @throws RangeError a weight not above 0
 */
export function grownBaseline(
	baselineG: number,
	growth: { readonly atBaselineG: number; readonly nowG: number }
): number {
	demandAboveZero(baselineG);
	demandAboveZero(growth.atBaselineG);
	demandAboveZero(growth.nowG);
	return (baselineG * growth.nowG) / growth.atBaselineG;
}

function demandAboveZero(weightG: number): void {
	if (!(weightG > 0 && Number.isFinite(weightG))) {
		throw new RangeError(`a weight must be above 0 g, got ${weightG}`);
	}
}
