import { QueryTypes } from 'sequelize';
import { db } from '$lib/server/db';

/** Rows of the database's own catalogue. */
export function ask<T extends object>(sql: string): Promise<T[]> {
	return db().query<T>(sql, { type: QueryTypes.SELECT });
}
