import type { EvidenceKind } from '../trends/fall-score';
import type { YieldModel } from '../trends/yield-model';
import type { Gain } from './gain';
import type { LandmarkPlace, Worth } from './history';

/** States of advice; `parked` only a person sets. */
export type AdviceState =
	'hold' | 'settling' | 'watch' | 'advance' | 'no-travel' | 'too-few-days' | 'parked';

/** Why; the words on the page stand elsewhere. */
export type ReasonCode =
	| 'parked'
	| 'check-hardware'
	| 'no-travel'
	| 'settling'
	| 'daily-limit'
	| 'lowering'
	| 'listen-first'
	| 'confirm-layer'
	| 'layer-unknown'
	| 'below-layer'
	| 'too-few-days'
	| 'common-cause'
	| 'yield-lost'
	| 'postponed'
	| 'unclear-landmarks'
	| 'losing-cells-still-useful'
	| 'early-sign'
	| 'stable'
	| 'tally-first'
	| 'quarter-cap';

/** A move to make. */
export interface Step {
	readonly um: number;
	readonly turns: number;
}

/** What would change the advice: the thing to come, and the figure it must reach where there is one. */
export interface Change {
	readonly by:
		| 'person'
		| 'impedance'
		| 'time'
		| 'landmark'
		| 'tallies'
		| 'statistic'
		| 'worth'
		| 'other-bundles'
		| 'new-drive';
	/** Hours on the animal's axis, number of tallies or natural-log units, by the kind above. */
	readonly value: number | null;
}

export interface Verdict {
	readonly state: AdviceState;
	readonly reason: ReasonCode;
	readonly step: Step | null;
	readonly change: Change;
}

/** One rule as it was applied. */
export interface TraceRow {
	/** 1 to 10 in their order; the caps come after them as 11 and 12. */
	readonly rule: number;
	readonly name: string;
	readonly inputs: Readonly<Record<string, number | string | boolean | null>>;
	readonly hasFired: boolean;
}

/** The numbers an advice rests on; null where there is none. */
export interface Evidence {
	/** S of the fall chart, natural-log units, and its limits. */
	readonly statistic: number;
	readonly watchAt: number;
	readonly advanceAt: number;
	readonly kind: EvidenceKind;
	readonly isByEye: boolean;
	/** What the bundle's own days taught of it. */
	readonly model: YieldModel;
	/** N on the latest day that counts. */
	readonly units: number | null;
	/** Days that count since the bundle came to rest, and those of the last five days. */
	readonly tallies: number;
	readonly talliesLately: number;
	/** Share of units passing quality: latest three days, and the baseline's. */
	readonly quality: number | null;
	readonly usualQuality: number | null;
	readonly worth: Worth | null;
	/** Its worth fell most of all bundles, before an alarm of the decoding error. */
	readonly hasLostMostWorth: boolean;
	readonly landmark: LandmarkPlace | null;
	/** Of this day's bundles able to show a fall, those that did; null when too few were able. */
	readonly commonShare: number | null;
	readonly isCommonCause: boolean;
}

export interface Advice extends Verdict {
	readonly bundle: string;
	readonly day: number;
	/** Rests on counts by eye. */
	readonly isProvisional: boolean;
	readonly trace: readonly TraceRow[];
	readonly evidence: Evidence;
	/** What an advance may bring; null unless one is advised on yield. */
	readonly gain: Gain | null;
	/** What moving puts at risk: the worth of its units, bits a window; null when unknown. */
	readonly loss: Worth | null;
}
