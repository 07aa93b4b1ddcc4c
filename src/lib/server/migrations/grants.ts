import type { Sequelize, Transaction } from 'sequelize';

/** Tables whose rows are working state rather than record, so the application may clear them. */
const CLEARED = ['auth_session', 'rate_limit', 'idempotency_key'];

/** Kept as written: the application may add rows and read them, nothing else. */
const APPEND_ONLY = ['log', 'lab_setting', 'turn', 'migration'];

export const APP_ROLE = 'quarterturn_app';

/**
 * Gives the application's role what it needs and no more. Runs after every migration, so that a
 * new table is covered without a line in its own file. A database whose owner could not make the
 * role (one handed to us by an administrator) keeps its triggers as the only guard.
 */
export async function grantApp(sequelize: Sequelize, t: Transaction): Promise<void> {
	await sequelize.query(
		`DO $$ BEGIN
			IF EXISTS (SELECT 1 FROM pg_roles WHERE rolname = '${APP_ROLE}') THEN
				GRANT USAGE ON SCHEMA public TO ${APP_ROLE};
				GRANT SELECT, INSERT, UPDATE ON ALL TABLES IN SCHEMA public TO ${APP_ROLE};
				GRANT USAGE ON ALL SEQUENCES IN SCHEMA public TO ${APP_ROLE};
				GRANT DELETE ON ${CLEARED.join(', ')} TO ${APP_ROLE};
				REVOKE UPDATE, DELETE, TRUNCATE ON ${APPEND_ONLY.join(', ')} FROM ${APP_ROLE};
			END IF;
		END $$`,
		{ transaction: t }
	);
}
