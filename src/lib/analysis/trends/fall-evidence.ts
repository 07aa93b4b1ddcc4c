import { demandModel, nextCountLogPmf, overGap, type YieldModel } from './yield-model';

/** What a fall does to the units of a bundle, for the likelihood ratio. */
export interface Fall {
	/** Taken off the daily chance of staying. */
	readonly survivalDrop: number;
	/** Factor of the newcomers a day. */
	readonly arrivalsFactor: number;
}

/** A bundle that collapses, and one that loses about half: between them they catch what lies between. */
export const FALLS: readonly Fall[] = [
	{ survivalDrop: 0.2, arrivalsFactor: 0.4 },
	{ survivalDrop: 0.1, arrivalsFactor: 0.7 }
];

/**
 * The model after a fall. A bundle whose units rarely stay cannot lose 0.2 of their chance: the
 * fallen chance is never below half of the usual one.
 */
export function fallenModel(usual: YieldModel, fall: Fall): YieldModel {
	demandModel(usual);
	return {
		survival: Math.max(usual.survival - fall.survivalDrop, usual.survival / 2),
		arrivals: usual.arrivals * fall.arrivalsFactor
	};
}

/** One step of a bundle between two recorded days. */
export interface YieldStep {
	/** Units on the earlier day. */
	readonly previous: number;
	/** Units on the later day. */
	readonly today: number;
	/** Of the earlier day's units, how many are still there; null when nobody matched them. */
	readonly kept: number | null;
	/** Days between, ≥ 1. */
	readonly gapDays: number;
}

/**
 * Evidence of one step that a bundle has fallen from one model to another: the natural logarithm of
 * the likelihood ratio (Page 1954). With matched units the kept and the new ones each tell; from
 * totals alone, the convolution of both. A gap enters as one step of several days.
 * @throws RangeError kept above either total, or a model or the gap out of range
 */
export function fallEvidence(step: YieldStep, usual: YieldModel, fallen: YieldModel): number {
	const before = overGap(usual, step.gapDays);
	const after = overGap(fallen, step.gapDays);
	const { previous, today, kept } = step;
	if (kept === null) {
		return nextCountLogPmf(after, previous, today) - nextCountLogPmf(before, previous, today);
	}
	if (!(kept >= 0 && kept <= Math.min(previous, today))) {
		throw new RangeError(`${kept} kept of ${previous} yesterday and ${today} today`);
	}
	return (
		kept * Math.log(after.survival / before.survival) +
		(previous - kept) * Math.log((1 - after.survival) / (1 - before.survival)) +
		(today - kept) * Math.log(after.arrivals / before.arrivals) -
		(after.arrivals - before.arrivals)
	);
}
