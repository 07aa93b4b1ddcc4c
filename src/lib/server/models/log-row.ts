import { QueryTypes } from 'sequelize';
import { db } from '$lib/server/db';

export interface LogEntry {
	id: number;
	at: Date;
	personId: string | null;
	personName: string | null;
	via: string;
	action: string;
	subjectKind: string;
	subjectId: string | null;
	detail: Record<string, unknown>;
}

export interface LogFilter {
	personId?: string;
	subjectKind?: string;
	subjectId?: string;
	/** A whole action or its first part: "person" finds "person.deactivated". */
	action?: string;
	from?: Date;
	to?: Date;
	before?: number;
}

interface Check {
	checked: number;
	isWhole: boolean;
	faultId: number | null;
	fault: 'number' | 'chain' | 'hash' | null;
}

// The log has no model: `record` alone writes it, rows never change, and reading it is all there is.

export function newest(filter: LogFilter, limit: number): Promise<LogEntry[]> {
	return db().query<LogEntry>(
		`SELECT l.id, l.at, l.person_id AS "personId", p.name AS "personName", l.via, l.action,
			l.subject_kind AS "subjectKind", l.subject_id AS "subjectId", l.detail
		FROM log l LEFT JOIN person p ON p.id = l.person_id
		WHERE ($before::bigint IS NULL OR l.id < $before)
			AND ($personId::uuid IS NULL OR l.person_id = $personId)
			AND ($subjectKind::text IS NULL OR l.subject_kind = $subjectKind)
			AND ($subjectId::uuid IS NULL OR l.subject_id = $subjectId)
			AND ($action::text IS NULL OR l.action = $action OR starts_with(l.action, $action || '.'))
			AND ($from::timestamptz IS NULL OR l.at >= $from)
			AND ($to::timestamptz IS NULL OR l.at < $to)
		ORDER BY l.id DESC LIMIT $limit`,
		{
			bind: {
				before: filter.before ?? null,
				personId: filter.personId ?? null,
				subjectKind: filter.subjectKind ?? null,
				subjectId: filter.subjectId ?? null,
				action: filter.action ?? null,
				from: filter.from?.toISOString() ?? null,
				to: filter.to?.toISOString() ?? null,
				limit
			},
			type: QueryTypes.SELECT
		}
	);
}

export async function kinds(): Promise<string[]> {
	const rows = await db().query<{ kind: string }>(
		'SELECT DISTINCT subject_kind AS kind FROM log ORDER BY 1',
		{ type: QueryTypes.SELECT }
	);
	return rows.map((row) => row.kind);
}

/** The first row is checked against the beginning, or against the last row left out. */
export async function verify(last: number | null): Promise<Check> {
	const [row] = await db().query<Check>(
		`WITH bounds AS (
			SELECT CASE WHEN $last::bigint IS NULL THEN 0
				ELSE greatest(max(id) - $last::bigint, 0) END AS after_id
			FROM log
		), linked AS (
			SELECT l.id, l.hash, l.previous_hash, log_payload(l) AS payload,
				lag(l.id) OVER byId AS id_before, lag(l.hash) OVER byId AS hash_before
			FROM log l, bounds WHERE l.id >= bounds.after_id
			WINDOW byId AS (ORDER BY l.id)
		), judged AS (
			SELECT id, CASE
				WHEN id <> coalesce(id_before, 0) + 1 THEN 'number'
				WHEN previous_hash <> coalesce(hash_before, '\\x00'::bytea) THEN 'chain'
				WHEN hash <> sha256(payload) THEN 'hash'
			END AS fault
			FROM linked, bounds WHERE id > bounds.after_id
		)
		SELECT count(*) AS checked, coalesce(min(after_id), 0) = 0 AS "isWhole",
			min(id) FILTER (WHERE fault IS NOT NULL) AS "faultId",
			(array_agg(fault ORDER BY id) FILTER (WHERE fault IS NOT NULL))[1] AS fault
		FROM judged FULL JOIN bounds ON true`,
		{ bind: { last }, type: QueryTypes.SELECT }
	);
	return row;
}
