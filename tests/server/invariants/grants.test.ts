import { describe, expect, it } from 'vitest';
import { ask } from './catalogue';

/** Working state: what a person signs out of, counts of tries, kept answers. */
const CLEARED = ['auth_session', 'idempotency_key', 'rate_limit'];
const APPEND_ONLY = ['lab_setting', 'log', 'migration', 'turn'];

async function tablesWhere(privilege: string): Promise<string[]> {
	const rows = await ask<{ table: string }>(
		`SELECT relname::text AS table FROM pg_class
		WHERE relkind = 'r' AND relnamespace = 'public'::regnamespace
		AND has_table_privilege(current_user, oid, '${privilege}') ORDER BY 1`
	);
	return rows.map(({ table }) => table);
}

describe("what the application's role may do", () => {
	it('is to delete working state only', async () => {
		expect(await tablesWhere('DELETE')).toEqual(CLEARED);
	});

	it('is never to empty a table', async () => {
		expect(await tablesWhere('TRUNCATE')).toEqual([]);
	});

	it('is to add to the log, the settings and the ledger, and change nothing there', async () => {
		const changeable = await tablesWhere('UPDATE');
		for (const table of APPEND_ONLY) expect(changeable).not.toContain(table);
		expect(await tablesWhere('INSERT')).toEqual(
			expect.arrayContaining(['lab_setting', 'log', 'turn'])
		);
	});

	it.each(['log', 'lab_setting', 'turn'])(
		'is refused a change of %s when it tries',
		async (table) => {
			const change = table === 'log' ? 'id = id' : 'id = gen_random_uuid()';
			await expect(ask(`UPDATE ${table} SET ${change}`)).rejects.toThrow(/permission denied/);
			await expect(ask(`DELETE FROM ${table}`)).rejects.toThrow(/permission denied/);
			await expect(ask(`TRUNCATE ${table}`)).rejects.toThrow(/permission denied/);
		}
	);
});
