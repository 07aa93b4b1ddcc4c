import { amplitudeStep, type AmplitudeLevel, type AmplitudeModel } from './amplitude-evidence';
import type { YieldStep } from './fall-evidence';
import { nextCountLogPmf, overGap, type YieldModel } from './yield-model';
import { binomialLogPmf } from '../statistics/binomial';
import { poissonLogPmf } from '../statistics/poisson';

/**
 * What has been learnt of a bundle since it last came to rest. Pseudo-counts: survival is
 * Beta(kept, lost), arrivals a day are Gamma(fresh, days), the priors included.
 */
export interface Baseline {
	readonly kept: number;
	readonly lost: number;
	readonly fresh: number;
	readonly days: number;
	/** Information on the level of ln amplitude, 1/variance; 0 before any. */
	readonly levelPrecision: number;
	/** Precision times level. */
	readonly levelSum: number;
}

/** Survival 0.8 and 1.3 arrivals a day, worth ten units and a day and a half; a lab's pool replaces it. */
export const PRIOR: Baseline = {
	kept: 8,
	lost: 2,
	fresh: 2,
	days: 1.5,
	levelPrecision: 0,
	levelSum: 0
};

/** Posterior means of survival and arrivals. */
export function yieldOf({ kept, lost, fresh, days }: Baseline): YieldModel {
	return { survival: kept / (kept + lost), arrivals: fresh / days };
}

/** Level of ln amplitude so far; NaN before any day with units. */
export function levelOf({ levelPrecision, levelSum }: Baseline): AmplitudeLevel {
	return { mean: levelSum / levelPrecision, variance: 1 / levelPrecision };
}

/**
 * Learns from one step. Without matched units the expected number of survivors under what is known
 * so far stands for them. A step over g days tells of g days: a unit still there stayed g times, a
 * lost one left half-way on average, and only arrivals that were not lost again are seen.
 */
export function learnYield(baseline: Baseline, step: YieldStep): Baseline {
	const { previous, today, gapDays } = step;
	const model = yieldOf(baseline);
	const kept = step.kept ?? expectedKept(overGap(model, gapDays), previous, today);
	const lost = previous - kept;
	return {
		...baseline,
		kept: baseline.kept + gapDays * kept + ((gapDays - 1) / 2) * lost,
		lost: baseline.lost + lost,
		fresh: baseline.fresh + today - kept,
		days: baseline.days + (1 - model.survival ** gapDays) / (1 - model.survival)
	};
}

/**
 * Learns the level of ln amplitude from one step; generalised least squares of the autoregression.
 * @param before NaN when the earlier day had no units: the later day then stands alone
 * @param today  NaN (no units) teaches nothing
 */
export function learnLevel(
	baseline: Baseline,
	before: number,
	today: number,
	gapDays: number,
	model: AmplitudeModel
): Baseline {
	if (!Number.isFinite(today)) return baseline;
	const isAlone = !Number.isFinite(before);
	const { memory, variance } = amplitudeStep(model, isAlone ? Infinity : gapDays);
	const share = 1 - memory;
	const seen = isAlone ? today : today - memory * before;
	return {
		...baseline,
		levelPrecision: baseline.levelPrecision + (share * share) / variance,
		levelSum: baseline.levelSum + (share * seen) / variance
	};
}

/** Mean number of survivors, the totals on both days known. */
function expectedKept(model: YieldModel, previous: number, today: number): number {
	const total = nextCountLogPmf(model, previous, today);
	let mean = 0;
	for (let kept = 1; kept <= Math.min(previous, today); kept++) {
		const log =
			binomialLogPmf(kept, previous, model.survival) + poissonLogPmf(today - kept, model.arrivals);
		mean += kept * Math.exp(log - total);
	}
	return mean;
}
