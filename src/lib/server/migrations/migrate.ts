import { Sequelize, QueryTypes, type Transaction } from 'sequelize';
import { Umzug, type UmzugStorage } from 'umzug';
import { prepareQueues } from '$lib/server/jobs/prepare-queues';
import { migrations } from './index';
import { grantApp } from './grants';

const MIGRATION_LOCK = 7421000;

interface Context {
	sequelize: Sequelize;
	t: Transaction;
}

/** The stock storage records outside the migration's transaction, so a rolled-back step can stand as done. */
const storage: UmzugStorage<Context> = {
	async logMigration({ name, context }) {
		await context.sequelize.query('INSERT INTO migration (name) VALUES ($name)', {
			bind: { name },
			transaction: context.t
		});
	},
	async unlogMigration() {
		throw new Error('Migrations only go forward');
	},
	async executed({ context }) {
		const rows = await context.sequelize.query<{ name: string }>(
			'SELECT name FROM migration ORDER BY name',
			{ type: QueryTypes.SELECT, transaction: context.t }
		);
		return rows.map((row) => row.name);
	}
};

async function withOwner<T>(ownerUrl: string, work: (sequelize: Sequelize) => Promise<T>) {
	const sequelize = new Sequelize(ownerUrl, { logging: false, pool: { max: 2 } });
	try {
		return await work(sequelize);
	} finally {
		await sequelize.close();
	}
}

/** Names of migrations that `migrate` would run. An empty database lacks them all. */
export async function pending(ownerUrl: string): Promise<string[]> {
	return withOwner(ownerUrl, async (sequelize) => {
		const [table] = await sequelize.query<{ found: string | null }>(
			"SELECT to_regclass('migration')::text AS found",
			{ type: QueryTypes.SELECT }
		);
		const done = table.found
			? await sequelize.query<{ name: string }>('SELECT name FROM migration', {
					type: QueryTypes.SELECT
				})
			: [];
		const names = new Set(done.map((row) => row.name));
		return migrations.map((m) => m.name).filter((name) => !names.has(name));
	});
}

/**
 * Brings the schema up to date as the owner, in one transaction: all of it or nothing.
 * Two processes may call it at once; the second waits and finds nothing to do.
 */
export async function migrate(ownerUrl: string): Promise<string[]> {
	return withOwner(ownerUrl, async (sequelize) => {
		const ran = await sequelize.transaction(async (t) => {
			await sequelize.query(`SELECT pg_advisory_xact_lock(${MIGRATION_LOCK})`, { transaction: t });
			await sequelize.query(
				'CREATE TABLE IF NOT EXISTS migration (name text PRIMARY KEY, run_at timestamptz NOT NULL DEFAULT now())',
				{ transaction: t }
			);
			const umzug = new Umzug<Context>({
				migrations: migrations.map(({ name, sql }) => ({
					name,
					up: async ({ context }) => {
						await context.sequelize.query(sql, { transaction: context.t });
					}
				})),
				context: { sequelize, t },
				storage,
				logger: undefined
			});
			const names = (await umzug.up()).map((m) => m.name);
			await grantApp(sequelize, t);
			return names;
		});
		await prepareQueues(ownerUrl);
		return ran;
	});
}
