import { QueryTypes } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { db } from '$lib/server/db';

describe("the application's role", () => {
	it('is not the owner and cannot make roles or databases', async () => {
		const [row] = await db().query<{ rolname: string; rolsuper: boolean; rolcreatedb: boolean }>(
			'SELECT rolname, rolsuper, rolcreatedb FROM pg_roles WHERE rolname = current_user',
			{ type: QueryTypes.SELECT }
		);
		expect(row).toEqual({ rolname: 'quarterturn_app', rolsuper: false, rolcreatedb: false });
	});

	it('cannot change the schema', async () => {
		await expect(db().query('CREATE TABLE mine (id int)')).rejects.toThrow(/permission denied/);
		await expect(db().query('ALTER TABLE person ADD mine int')).rejects.toThrow(/must be owner/);
	});

	it('cannot change or empty the log', async () => {
		await expect(db().query("UPDATE log SET action = 'x'")).rejects.toThrow(/permission denied/);
		await expect(db().query('DELETE FROM log')).rejects.toThrow(/permission denied/);
		await expect(db().query('TRUNCATE log')).rejects.toThrow(/permission denied/);
	});

	it('can make nothing in another database of the cluster', async () => {
		const other = new URL(process.env.DATABASE_URL ?? '');
		other.pathname = '/postgres';
		const { withClient } = await import('../../src/commands/cluster/roles');
		await expect(withClient(other.href, async (c) => c.query('CREATE SCHEMA x'))).rejects.toThrow(
			/permission denied/
		);
	});
});
