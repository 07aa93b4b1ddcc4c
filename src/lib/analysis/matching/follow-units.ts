import { assignPairs } from './assign-pairs';
import { candidatesOf, type Candidate, type UnitAt } from './match-candidates';
import { demandMatchRule, type MatchRule } from './match-rule';
import type { BundleDay } from './match-unit';

/** What a person decided of a pair; the proposal stays beside it. */
export interface Decision {
	readonly from: UnitAt;
	readonly to: UnitAt;
	readonly isSame: boolean;
}

/** Units judged to be one cell. */
export interface Lineage {
	/** By day, at most one a day. */
	readonly members: readonly UnitAt[];
	/** Probability of each step from a member to the next; 1 where a person said so. */
	readonly probabilities: readonly number[];
}

/** All units of a bundle, followed over the days. */
export interface Followed {
	readonly lineages: readonly Lineage[];
	/** Lineage of every unit of every day. */
	readonly lineageOf: readonly Int32Array[];
	/** Every pair that was weighed, also those not taken. */
	readonly candidates: readonly Candidate[];
}

interface Growing {
	members: UnitAt[];
	probabilities: number[];
}

/**
 * Follows the units of one bundle: on every recorded day the lineages seen on one of the last
 * `reachDays` recorded days are compared, by their last member, with the units of the day, and paired
 * for the largest total gain. Who is paired with none begins a lineage.
 *
 * A pair a person called the same is joined whatever its score; units a person called different never
 * come into one lineage.
 * @throws RangeError days do not ascend, or the rule makes no sense
 * Cost: O(days · reach · units² · (samples + lags)).
 */
export function followUnits(
	days: readonly BundleDay[],
	rule: MatchRule,
	decisions: readonly Decision[] = []
): Followed {
	demandMatchRule(rule);
	const growing: Growing[] = [];
	const candidates: Candidate[] = [];
	const lineageOf = days.map(({ units }) => new Int32Array(units.length).fill(-1));
	days.forEach(({ day, units }, today) => {
		if (today > 0 && !(day > days[today - 1].day)) throw new RangeError('days must ascend');
		const join = (row: number, unit: number, probability: number) => {
			growing[row].members.push({ day: today, unit });
			growing[row].probabilities.push(probability);
			lineageOf[today][unit] = row;
		};
		for (const { from, to, isSame } of decisions) {
			if (!isSame || to.day !== today) continue;
			const row = lineageOf[from.day][from.unit];
			const isFree = row >= 0 && growing[row].members.every(({ day: at }) => at < today);
			if (isFree && lineageOf[today][to.unit] < 0) join(row, to.unit, 1);
		}
		const open = openLineages(growing, today, rule.reachDays);
		const earlier = open.map(({ last }) => last);
		const mayBeOne = (r: number, unit: number) =>
			lineageOf[today][unit] < 0 &&
			!isRefused(decisions, growing[open[r].row].members, { day: today, unit });
		const found = candidatesOf(days, earlier, today, rule, mayBeOne);
		candidates.push(...found);
		const rowOf = new Map(earlier.map((last, r) => [last, r]));
		const scores = new Float64Array(open.length * units.length).fill(-Infinity);
		const probabilities = new Float64Array(scores.length);
		const { slope, intercept } = rule.calibration;
		for (const { from, to, score, probability } of found) {
			if (probability < rule.leastProbability) continue;
			const at = (rowOf.get(from) ?? 0) * units.length + to.unit;
			scores[at] = slope * score + intercept;
			probabilities[at] = probability;
		}
		const { pairs } = assignPairs(scores, open.length, units.length, rule.threshold);
		for (const [r, unit] of pairs) join(open[r].row, unit, probabilities[r * units.length + unit]);
		for (let unit = 0; unit < units.length; unit++) {
			if (lineageOf[today][unit] >= 0) continue;
			lineageOf[today][unit] = growing.length;
			growing.push({ members: [{ day: today, unit }], probabilities: [] });
		}
	});
	return { lineages: growing, lineageOf, candidates };
}

function openLineages(growing: readonly Growing[], today: number, reachDays: number) {
	return growing.flatMap(({ members }, row) => {
		const last = members[members.length - 1];
		return last.day < today && last.day >= today - reachDays ? [{ last, row }] : [];
	});
}

function isRefused(
	decisions: readonly Decision[],
	members: readonly UnitAt[],
	unit: UnitAt
): boolean {
	return decisions.some(
		({ from, to, isSame }) =>
			!isSame &&
			((isAt(to, unit) && members.some((member) => isAt(member, from))) ||
				(isAt(from, unit) && members.some((member) => isAt(member, to))))
	);
}

function isAt(a: UnitAt, b: UnitAt): boolean {
	return a.day === b.day && a.unit === b.unit;
}
