import { QueryTypes, type Transaction } from 'sequelize';
import { db } from './db';

/** Rows of a reading query that models cannot say in one piece; `$name` takes a bound value. */
export function select<T extends object>(
	sql: string,
	bind: Record<string, unknown>,
	transaction?: Transaction
): Promise<T[]> {
	return db().query<T>(sql, { bind, type: QueryTypes.SELECT, transaction });
}
