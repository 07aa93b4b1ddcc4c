import type { DayCell } from '$lib/components/animal/day-strip';
import { daysBetween, daysFrom } from '$lib/format/day-count';
import { groupBy } from '$lib/server/group-by';
import type { StripFacts } from './animal-strip-facts';

/**
 * The cells of a day strip, one a lab day from the first surgery to `today`; with `today` null
 * (the animal has ended) to the last day on which anything was written.
 */
export function stripCells(facts: StripFacts, today: string | null): DayCell[] {
	const [surgery] = facts.surgeries.toSorted();
	if (surgery === undefined) return [];
	const byDay = {
		states: new Map(facts.days.map((row) => [row.day, row.state])),
		turns: groupBy(facts.turns, (row) => row.day),
		tallies: groupBy(facts.tallies, (row) => row.day),
		sortings: groupBy(facts.sortings, (row) => row.day),
		errors: groupBy(facts.errors, (row) => row.day)
	};
	const last =
		today ??
		Object.values(byDay)
			.flatMap((map) => [...map.keys()])
			.toSorted()
			.at(-1);
	let sorterBefore: string | null = null;
	return daysFrom(surgery, last ?? surgery).map((day) => {
		const turns = byDay.turns.get(day) ?? [];
		const sorting = largest(byDay.sortings.get(day) ?? [], (row) => row.units);
		const sorter = sorting?.sorter ?? null;
		const isSorterChange = sorter !== null && sorterBefore !== null && sorter !== sorterBefore;
		sorterBefore = sorter ?? sorterBefore;
		const counted = countedUnits(byDay.tallies.get(day) ?? []);
		return {
			day,
			dayNumber: daysBetween(surgery, day),
			largestTurn: largest(turns, (row) => Math.abs(row.turns))?.turns ?? null,
			movedCarriages: new Set(turns.map((row) => row.carriageId)).size,
			yield: yieldOf(counted, sorting?.units ?? null),
			errorCm: largest(byDay.errors.get(day) ?? [], (row) => row.runS)?.errorCm ?? null,
			isSorterChange,
			hasSurgery: day !== surgery && facts.surgeries.includes(day),
			signature: byDay.states.get(day) ?? 'none'
		};
	});
}

/** A person's count: the latest of each bundle, as one bundle may be counted before and after a move. */
function countedUnits(tallies: StripFacts['tallies']): number | null {
	const byEye = tallies.filter((row) => row.source === 'by-eye');
	if (byEye.length === 0) return null;
	const latest = groupBy(byEye, (row) => row.bundleId);
	return [...latest.values()].reduce((sum, rows) => {
		const row = largest(rows, ({ takenAt }) => takenAt.getTime());
		return sum + (row?.units ?? 0);
	}, 0);
}

/**
 * A count by eye where there is one, else the largest sorting of the day: sessions cut apart share
 * cells, so their units cannot be added up.
 */
function yieldOf(counted: number | null, sorted: number | null): DayCell['yield'] {
	if (counted !== null) return { units: counted, source: 'tally' };
	return sorted === null ? null : { units: sorted, source: 'sorted' };
}

function largest<T>(rows: readonly T[], size: (row: T) => number): T | undefined {
	return rows.reduce<T | undefined>(
		(best, row) => (best === undefined || size(row) > size(best) ? row : best),
		undefined
	);
}
