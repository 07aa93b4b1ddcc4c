import PgBoss from 'pg-boss';
import { QueryTypes, type Transaction } from 'sequelize';
import { db } from '$lib/server/db';
import { settings } from '$lib/server/settings';
import { queues, type QueueData, type QueueName } from './queues';

const kept = globalThis as typeof globalThis & { quarterturnQueue?: Promise<PgBoss> };

/** A sender without timers of its own; consumers and upkeep live in the worker process. */
function sender(): Promise<PgBoss> {
	kept.quarterturnQueue ??= (async () => {
		const boss = new PgBoss({
			connectionString: settings().databaseUrl,
			max: 1,
			migrate: false,
			supervise: false,
			schedule: false,
			application_name: 'quarterturn-send'
		});
		// Each send reports its own failure; without a listener the process would end.
		boss.on('error', () => undefined);
		return boss.start();
	})();
	return kept.quarterturnQueue;
}

/** Hands out a job when, and only when, `t` commits. */
export async function enqueue<Q extends QueueName>(
	queue: Q,
	data: QueueData<Q>,
	t: Transaction
): Promise<void> {
	const boss = await sender();
	await boss.send(queue, queues[queue].parse(data), {
		db: {
			// pg-boss leaves options out as undefined, which Sequelize takes for a missing value.
			executeSql: async (text: string, values: unknown[]) => ({
				rows: await db().query(text, {
					bind: values.map((value) => value ?? null),
					transaction: t,
					type: QueryTypes.SELECT
				})
			})
		}
	});
}

export async function closeQueue(): Promise<void> {
	const open = kept.quarterturnQueue;
	kept.quarterturnQueue = undefined;
	if (open) await (await open).stop({ graceful: false });
}
