import type { AdviceState, Change, Evidence, ReasonCode, Step, TraceRow, Verdict } from '../advice';
import type { Asking, BundleHistory } from '../history';
import type { AdviceParameters } from '../parameters';

/** What every rule may look at. */
export interface View {
	readonly bundle: BundleHistory;
	readonly asking: Asking;
	readonly evidence: Evidence;
	readonly parameters: AdviceParameters;
}

/** A rule's answer: the figures it looked at, and its verdict when it fires. */
export interface Ruling {
	readonly inputs: TraceRow['inputs'];
	readonly verdict: Verdict | null;
}

export interface Rule {
	readonly number: number;
	readonly name: string;
	apply(view: View): Ruling;
}

/** A verdict in one line. */
export function verdict(
	state: AdviceState,
	reason: ReasonCode,
	by: Change['by'],
	value: number | null = null,
	step: Step | null = null
): Verdict {
	return { state, reason, step, change: { by, value } };
}
