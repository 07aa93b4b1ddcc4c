import { QueryTypes } from 'sequelize';
import { db } from '$lib/server/db';

interface LogRow {
	action: string;
	personId: string | null;
	detail: Record<string, unknown>;
}

/** Log rows about one thing, oldest first. */
export function logOf(kind: string, id: string): Promise<LogRow[]> {
	return db().query<LogRow>(
		`SELECT action, person_id AS "personId", detail FROM log
		WHERE subject_kind = $kind AND subject_id = $id ORDER BY id`,
		{ bind: { kind, id }, type: QueryTypes.SELECT }
	);
}
