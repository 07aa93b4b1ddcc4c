import type { Advice, TraceRow, Verdict } from './advice';
import { capAdvances } from './caps';
import { evidenceOf } from './evidence';
import { followAnimal, type FollowedAnimal } from './follow';
import { gainOf, type PastAdvance } from './gain';
import type { AnimalHistory, Asking } from './history';
import { ADVICE_DEFAULTS, type AdviceParameters } from './parameters';
import { RULES } from './rules/order';
import type { View } from './rules/rule';
import { thresholdSource, type ThresholdSource } from './thresholds';

export interface AdviseOptions {
	readonly parameters?: AdviceParameters;
	/** Shared between calls it saves the simulation of limits; it must come from these parameters. */
	readonly thresholds?: ThresholdSource;
	/** What the animal's days gave, when the caller has followed them already. */
	readonly followed?: FollowedAnimal;
	/** The lab's earlier settled advances, for the gain. */
	readonly pastAdvances?: readonly PastAdvance[];
}

/**
 * Advice for every bundle of an animal at one moment, in the order of the bundles: ten rules, of
 * which the first that fires decides, then the caps that concern several bundles. Bundles of other
 * roles than `record` are advised only while they are lowered.
 * The same input always gives the same advice. It is a statistic, never an order.
 * @throws RangeError days of a bundle out of order
 */
export function advise(
	animal: AnimalHistory,
	asking: Asking,
	options: AdviseOptions = {}
): Advice[] {
	const { parameters = ADVICE_DEFAULTS, pastAdvances = [] } = options;
	const thresholds = options.thresholds ?? thresholdSource(parameters);
	const followed = options.followed ?? followAnimal(animal, asking.day, parameters);
	const advised: Advice[] = [];
	for (const bundle of animal.bundles) {
		const isRecording = bundle.role === 'record';
		const evidence = evidenceOf(bundle, animal, followed, asking, parameters, thresholds);
		const decided = decide({ bundle, asking, evidence, parameters });
		if (!isRecording && decided.rule > 3) continue;
		if (!isRecording && bundle.isInLayer) continue;
		advised.push({
			...decided.verdict,
			bundle: bundle.bundle,
			day: asking.day,
			isProvisional: evidence.isByEye && decided.rule > 4,
			trace: decided.trace,
			evidence,
			gain: null,
			loss: evidence.worth
		});
	}
	return capAdvances(advised, animal, asking, parameters).map((advice) =>
		advice.state === 'advance' && advice.reason === 'yield-lost' && advice.step
			? { ...advice, gain: gainOf(advice.step.um, advice.evidence, pastAdvances) }
			: advice
	);
}

/** Applies the rules in their order; later ones than the first that fires are not looked at. */
function decide(view: View): { rule: number; verdict: Verdict; trace: TraceRow[] } {
	const trace: TraceRow[] = [];
	for (const rule of RULES) {
		const { inputs, verdict } = rule.apply(view);
		trace.push({ rule: rule.number, name: rule.name, inputs, hasFired: verdict !== null });
		if (verdict) return { rule: rule.number, verdict, trace };
	}
	throw new Error('the last rule did not fire');
}
