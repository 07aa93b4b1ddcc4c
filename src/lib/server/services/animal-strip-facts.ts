import { select } from '$lib/server/select';
import type { DayState, TallySource } from '$lib/schemas/enumerations';

/** Everything a day strip is computed from, each with its lab day. */
export interface StripFacts {
	surgeries: string[];
	days: { day: string; state: DayState }[];
	turns: { day: string; carriageId: string; turns: number }[];
	tallies: { day: string; bundleId: string; source: TallySource; takenAt: Date; units: number }[];
	/** Sortings in force: neither withdrawn nor superseded. */
	sortings: { day: string; sorter: string; units: number }[];
	/** Decoding errors of sessions in force, with how long the animal ran. */
	errors: { day: string; runS: number; errorCm: number }[];
}

const SURGERIES = `SELECT surgery_day::text AS day FROM implant
	WHERE animal_id = $animalId AND withdrawn_at IS NULL ORDER BY surgery_day`;

const DAYS = `SELECT date::text AS day, state FROM day WHERE animal_id = $animalId`;

const TURNS = `SELECT t.done_at AS "doneAt", t.carriage_id AS "carriageId", t.turns
	FROM turn_in_force t
	JOIN carriage c ON c.id = t.carriage_id
	JOIN implant i ON i.id = c.implant_id AND i.withdrawn_at IS NULL
	WHERE i.animal_id = $animalId AND t.turns <> 0`;

// A unit is a cell somebody set apart; hash on a wire is not.
const TALLIES = `SELECT d.date::text AS day, t.bundle_id AS "bundleId", t.source, t.taken_at AS "takenAt",
		coalesce(t.principal, 0) + coalesce(t.interneuron, 0) + coalesce(t.unclear, 0) AS units
	FROM tally t JOIN day d ON d.id = t.day_id
	WHERE d.animal_id = $animalId AND t.withdrawn_at IS NULL
		AND num_nonnulls(t.principal, t.interneuron, t.unclear) > 0`;

const SORTINGS = `SELECT d.date::text AS day, s.person_id || ' ' || s.program AS sorter,
		(SELECT count(*) FROM unit u WHERE u.sorting_id = s.id AND u.spike_count > 0
			AND NOT EXISTS (SELECT 1 FROM exclusion e WHERE e.unit_id = u.id AND e.withdrawn_at IS NULL)
		)::int AS units
	FROM sorting s JOIN day d ON d.id = s.day_id
	WHERE s.animal_id = $animalId AND s.withdrawn_at IS NULL
		AND NOT EXISTS (SELECT 1 FROM sorting n WHERE n.supersedes_id = s.id AND n.withdrawn_at IS NULL)`;

const ERRORS = `SELECT d.date::text AS day, a.median_error_cm AS "errorCm",
		(SELECT coalesce(sum(e.stop_s - e.start_s), 0) FROM epoch e
			WHERE e.session_id = s.id AND e.kind = 'run' AND e.withdrawn_at IS NULL)::float8 AS "runS"
	FROM session s JOIN day d ON d.id = s.day_id JOIN analysis a ON a.id = s.current_analysis_id
	WHERE s.animal_id = $animalId AND s.withdrawn_at IS NULL AND a.median_error_cm IS NOT NULL`;

export async function stripFacts(
	animalId: string,
	dayOf: (moment: Date) => string
): Promise<StripFacts> {
	const ask = <T extends object>(sql: string) => select<T>(sql, { animalId });
	const [surgeries, days, turns, tallies, sortings, errors] = await Promise.all([
		ask<{ day: string }>(SURGERIES),
		ask<StripFacts['days'][number]>(DAYS),
		ask<{ doneAt: Date; carriageId: string; turns: number }>(TURNS),
		ask<StripFacts['tallies'][number]>(TALLIES),
		ask<StripFacts['sortings'][number]>(SORTINGS),
		ask<StripFacts['errors'][number]>(ERRORS)
	]);
	return {
		surgeries: surgeries.map((row) => row.day),
		days,
		turns: turns.map((row) => ({ ...row, day: dayOf(row.doneAt) })),
		tallies,
		sortings,
		errors
	};
}
