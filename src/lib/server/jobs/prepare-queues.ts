import PgBoss from 'pg-boss';
import { Sequelize } from 'sequelize';
import { APP_ROLE } from '$lib/server/migrations/grants';
import { queueNames, queueOptions } from './queues';

/** Makes the queue's schema and one queue per kind of job, as the owner: each queue is a table. */
export async function prepareQueues(ownerUrl: string): Promise<void> {
	const boss = new PgBoss({
		connectionString: ownerUrl,
		max: 2,
		supervise: false,
		schedule: false,
		application_name: 'quarterturn-migrate'
	});
	const faults: unknown[] = [];
	boss.on('error', (fault) => faults.push(fault));
	await boss.start();
	try {
		const present = new Set((await boss.getQueues()).map((queue) => queue.name));
		for (const name of queueNames) {
			const options = { name, policy: 'standard' as const, ...queueOptions[name] };
			if (present.has(name)) await boss.updateQueue(name, options);
			else await boss.createQueue(name, options);
		}
	} finally {
		await boss.stop({ graceful: false });
	}
	if (faults.length > 0) throw new Error('Preparing the queues failed', { cause: faults[0] });

	const sequelize = new Sequelize(ownerUrl, { logging: false, pool: { max: 1 } });
	try {
		await sequelize.query(`DO $$ BEGIN
			IF EXISTS (SELECT 1 FROM pg_roles WHERE rolname = '${APP_ROLE}') THEN
				GRANT USAGE ON SCHEMA pgboss TO ${APP_ROLE};
				GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA pgboss TO ${APP_ROLE};
				GRANT EXECUTE ON ALL FUNCTIONS IN SCHEMA pgboss TO ${APP_ROLE};
			END IF;
		END $$`);
	} finally {
		await sequelize.close();
	}
}
