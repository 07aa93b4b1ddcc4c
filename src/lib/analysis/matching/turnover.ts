import type { Followed } from './follow-units';

/** What became of the units of a bundle on one recorded day. */
export interface Turnover {
	/** Seen this day and the recorded day before. */
	readonly kept: number;
	/** Seen this day and earlier, but not the day before. */
	readonly foundAgain: number;
	/** Seen this day first. */
	readonly fresh: number;
	/** Seen before and after, but not this day. */
	readonly missed: number;
	/** Seen last the day before. */
	readonly lost: number;
	/** Later days may still find some of the lost. */
	readonly isProvisional: boolean;
}

/**
 * Kept, found again, new, missed and lost units of every recorded day; on the first day all are new.
 * @param reachDays recorded days back that lineages were looked for
 */
export function turnoverByDay({ lineages, lineageOf }: Followed, reachDays: number): Turnover[] {
	const days = lineageOf.length;
	const empty = { kept: 0, foundAgain: 0, fresh: 0, missed: 0, lost: 0 };
	const counts = lineageOf.map(() => ({ ...empty }));
	for (const { members } of lineages) {
		members.forEach(({ day }, k) => {
			const before = k > 0 ? members[k - 1].day : NaN;
			if (k === 0) counts[day].fresh++;
			else if (before === day - 1) counts[day].kept++;
			else counts[day].foundAgain++;
			for (let between = before + 1; between < day; between++) counts[between].missed++;
		});
		const last = members[members.length - 1].day;
		if (last + 1 < days) counts[last + 1].lost++;
	}
	return counts.map((count, day) => ({
		...count,
		isProvisional: day > 0 && day - 1 + reachDays >= days
	}));
}
