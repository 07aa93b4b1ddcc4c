import type { Advice, ReasonCode } from './advice';
import type { AnimalHistory, Asking } from './history';
import type { AdviceParameters } from './parameters';
import { verdict } from './rules/rule';

/**
 * Caps on advances for lost yield; lowering is outside them. None without a tally since the last
 * one advised for the bundle, and on one day none beyond a quarter of the animal's recording bundles,
 * those advised earlier that day included (one at least, or small drives would never move): the
 * bundles whose statistic stands highest above its limit go first.
 */
export function capAdvances(
	advised: readonly Advice[],
	animal: AnimalHistory,
	asking: Asking,
	{ dayShare }: AdviceParameters
): Advice[] {
	const recording = animal.bundles.filter(({ role }) => role === 'record').length;
	const allowed = Math.max(1, Math.floor(recording * dayShare));
	const already = animal.advances.filter(({ day }) => day === asking.day);
	const room = allowed - new Set(already.map(({ bundle }) => bundle)).size;
	const waiting = new Set(
		advised
			.filter(isYieldAdvance)
			.filter((advice) => lacksTally(advice, animal))
			.map(codeOf)
	);
	const first = new Set(
		advised
			.filter((advice) => isYieldAdvance(advice) && !waiting.has(advice.bundle))
			.sort(byStrength)
			.slice(0, Math.max(0, room))
			.map(codeOf)
	);
	return advised.map((advice) => {
		if (!isYieldAdvance(advice)) return advice;
		const isWaiting = waiting.has(advice.bundle);
		const tally = capped(advice, 11, 'tally between advances', isWaiting, 'tally-first');
		if (isWaiting) return tally;
		return capped(tally, 12, 'share of a day', !first.has(advice.bundle), 'quarter-cap', {
			recording,
			allowed,
			already: already.length
		});
	});
}

const isYieldAdvance = ({ state, reason }: Advice) =>
	state === 'advance' && reason === 'yield-lost';

const codeOf = ({ bundle }: Advice) => bundle;

/** Furthest above its limit first; equal ones by code, so that the order never depends on chance. */
function byStrength(a: Advice, b: Advice): number {
	const above = ({ evidence }: Advice) => evidence.statistic - evidence.advanceAt;
	return above(b) - above(a) || (a.bundle < b.bundle ? -1 : 1);
}

/** Whether no day has counted since the bundle's last advised advance. */
function lacksTally({ bundle, evidence }: Advice, { advances, bundles }: AnimalHistory): boolean {
	const last = advances.filter((one) => one.bundle === bundle).map(({ day }) => day);
	if (last.length === 0) return false;
	const days = bundles.find((one) => one.bundle === bundle)?.days ?? [];
	const since = Math.max(...last);
	return evidence.tallies === 0 || !days.some((day) => day.day > since && !day.isLeftOut);
}

function capped(
	advice: Advice,
	rule: number,
	name: string,
	isCapped: boolean,
	reason: ReasonCode,
	inputs: Advice['trace'][number]['inputs'] = {}
): Advice {
	const trace = [...advice.trace, { rule, name, inputs, hasFired: isCapped }];
	return isCapped
		? {
				...advice,
				...verdict('watch', reason, reason === 'tally-first' ? 'tallies' : 'time'),
				trace
			}
		: { ...advice, trace };
}
