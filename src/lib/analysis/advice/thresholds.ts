import { seeded } from '../random/seeded';
import { fallenModel } from '../trends/fall-evidence';
import type { EvidenceKind } from '../trends/fall-score';
import { fallThresholds } from '../trends/fall-threshold';
import type { YieldModel } from '../trends/yield-model';
import type { AdviceParameters } from './parameters';

/** Limits of the fall chart, natural-log units. */
export interface Thresholds {
	readonly watchAt: number;
	readonly advanceAt: number;
}

/** Gives the limits for a bundle; asking twice gives the same. */
export type ThresholdSource = (model: YieldModel, kind: EvidenceKind) => Thresholds;

/** Models are rounded to 0.05 survival and 20 % arrivals: limits of neighbours differ by 0.3 at most. */
const SURVIVAL_STEP = 0.05;
const ARRIVALS_STEP = Math.log(1.2);

/**
 * Simulated limits, each made when first asked for and then kept: one source serves all bundles of a
 * lab. Every rounded model starts from the same seed, so the limits depend neither on the order of
 * asking nor on who else asks.
 * Cost: about 0.1 s for a model not asked for before.
 */
export function thresholdSource(parameters: AdviceParameters): ThresholdSource {
	const known = new Map<string, Thresholds>();
	return (model, kind) => {
		const survivalSteps = Math.round(model.survival / SURVIVAL_STEP);
		const survival = Math.min(0.95, Math.max(SURVIVAL_STEP, survivalSteps * SURVIVAL_STEP));
		const arrivalSteps = Math.round(Math.log(model.arrivals) / ARRIVALS_STEP);
		const key = `${kind} ${survival} ${arrivalSteps}`;
		const found = known.get(key);
		if (found) return found;
		const rounded = { survival, arrivals: Math.exp(arrivalSteps * ARRIVALS_STEP) };
		const [watchAt, advanceAt] = fallThresholds(
			rounded,
			parameters.fall.falls.map((fall) => fallenModel(rounded, fall)),
			kind,
			[parameters.watchRunDays, parameters.advanceRunDays],
			seeded(parameters.seed, 'advice limits'),
			{ amplitude: parameters.fall.amplitude }
		);
		const made = { watchAt, advanceAt };
		known.set(key, made);
		return made;
	};
}
