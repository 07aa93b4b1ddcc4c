import { describe, expect, it } from 'vitest';
import { db } from '$lib/server/db';
import { ask } from './catalogue';

/** Tables without a model: written by the log itself, a library, or the migrator. */
const WITHOUT_MODEL = ['log', 'rate_limit', 'migration'];

async function columnsByTable(): Promise<Map<string, string[]>> {
	const rows = await ask<{ table: string; columns: string[] }>(
		`SELECT c.table_name AS table, array_agg(c.column_name::text) AS columns
		FROM information_schema.columns c
		JOIN information_schema.tables t USING (table_schema, table_name)
		WHERE c.table_schema = 'public' AND t.table_type = 'BASE TABLE' GROUP BY 1`
	);
	return new Map(rows.map(({ table, columns }) => [table, columns.sort()]));
}

describe('models', () => {
	it('have the columns of their tables, no more and no fewer', async () => {
		const tables = await columnsByTable();
		for (const model of Object.values(db().models)) {
			const columns = Object.values(model.getAttributes()).map(({ field }) => field);
			expect(columns.sort(), model.tableName).toEqual(tables.get(model.tableName));
		}
	});

	it('exist for every table of the record', async () => {
		const tables = [...(await columnsByTable()).keys()].sort();
		const modelled = Object.values(db().models).map((model) => model.tableName);
		expect(tables).toEqual([...modelled, ...WITHOUT_MODEL].sort());
	});

	it('demand no value that the table can do without', async () => {
		const rows = await ask<{ table: string; column: string }>(
			`SELECT table_name AS table, column_name AS column FROM information_schema.columns
			WHERE table_schema = 'public' AND is_nullable = 'NO' AND column_default IS NULL
			AND is_generated = 'NEVER'`
		);
		const required = new Set(rows.map(({ table, column }) => `${table}.${column}`));
		for (const model of Object.values(db().models)) {
			for (const attribute of Object.values(model.getAttributes())) {
				const name = `${model.tableName}.${attribute.field}`;
				if (attribute.allowNull === false) expect(required, name).toContain(name);
			}
		}
	});
});
