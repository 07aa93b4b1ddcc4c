import { nextCount, nextCountAtMost, overGap, type YieldModel } from '../trends/yield-model';
import type { AdviceParameters } from './parameters';

/** One bundle's step to the day under test. */
export interface CommonStep {
	readonly model: YieldModel;
	readonly previous: number;
	readonly today: number;
	readonly gapDays: number;
}

/** Whether a bundle could have shown a fall on a day, and whether it did. */
export function shownFall(
	{ model, previous, today, gapDays }: CommonStep,
	{ fallSds, ableP }: AdviceParameters
): { readonly isAble: boolean; readonly hasFallen: boolean } {
	const step = overGap(model, gapDays);
	const { mean, variance } = nextCount(step, previous);
	const limit = mean - fallSds * Math.sqrt(variance);
	const isAble = limit > 0 && nextCountAtMost(step, previous, 0) < ableP;
	return { isAble, hasFallen: isAble && today < limit };
}

/** A day's falls over many bundles. */
export interface CommonCause {
	readonly able: number;
	readonly fell: number;
	/** NaN when fewer than four were able: the test cannot tell. */
	readonly share: number;
	/** So many fell together that the cause lies outside them: headstage, reference, reader, animal. */
	readonly isCommon: boolean;
}

/** Judges the falls of one day, counted over the bundles of one animal or of all that shared a rig. */
export function commonCause(able: number, fell: number, parameters: AdviceParameters): CommonCause {
	const share = able >= parameters.commonAble ? fell / able : NaN;
	return { able, fell, share, isCommon: share >= parameters.commonShare };
}
