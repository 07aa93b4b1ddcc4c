import PgBoss from 'pg-boss';
import { closeDb, db } from '$lib/server/db';
import { closeTransport } from '$lib/server/mail/transport';
import { handOutOrphans } from '$lib/server/services/analysis-runs';
import { wakeForgotten } from '$lib/server/services/outbox';
import { settings } from '$lib/server/settings';
import { closeQueue } from './enqueue';
import { handlers, type JobContext } from './handlers';
import { queueConnection } from './queue-connection';
import { jobData, queueNames, type QueueName } from './queues';
import { closeThreads } from './threads';
import { holdWorkerLock } from './worker-lock';

/** A killed worker's analyses are seen at the next look; twice this is the longest wait. */
const LOOK_EVERY_MS = 4000;
/** How long a stopping worker lets running jobs finish. */
const GRACE_MS = 8000;
const POLL_S = 0.5;

export interface Worker {
	/** Stops taking jobs, waits a little for the running ones, then lays them down for another worker. */
	stop(): Promise<void>;
}

/**
 * Consumes every queue until stopped. Survives a database that goes away: pg-boss keeps asking, the
 * worker's lock is taken again, and what was lost meanwhile is handed out anew.
 * @throws when the database cannot be reached at the start
 */
export async function startWorker(): Promise<Worker> {
	// Defines the models, which handlers use before anything else asks for the database.
	db();
	const lock = await holdWorkerLock();
	const running = new Set<string>();
	const abort = new AbortController();
	const connection = queueConnection(complain('queue'));
	const boss = new PgBoss({
		db: connection,
		migrate: false,
		schedule: false,
		supervise: true
	});
	boss.on('error', complain('queue'));
	try {
		await boss.start();
		for (const name of queueNames) {
			await consume(boss, name, { lock: lock.number, running, signal: abort.signal });
		}
	} catch (fault) {
		await boss.stop({ graceful: false }).catch(complain('queue'));
		await connection.close();
		await lock.release();
		throw fault;
	}

	wakeForgotten().catch(complain('mail'));

	let looking: Promise<unknown> | null = null;
	const look = setInterval(() => {
		looking ??= handOutOrphans(lock.number, running)
			.catch(complain('look for lost analyses'))
			.finally(() => (looking = null));
	}, LOOK_EVERY_MS);

	return {
		async stop() {
			clearInterval(look);
			await looking;
			const cut = setTimeout(() => abort.abort(), GRACE_MS);
			await boss.stop({ graceful: true, wait: true, timeout: GRACE_MS + 5000 });
			clearTimeout(cut);
			await connection.close();
			await closeThreads();
			await closeTransport();
			await lock.release();
			await closeQueue();
			await closeDb();
		}
	};
}

/** One analysis a thread at a time; mail one after the other, as servers like it. */
function consumers(name: QueueName): number {
	return name === 'analyse' ? settings().workers : 1;
}

async function consume<Q extends QueueName>(
	boss: PgBoss,
	name: Q,
	context: Omit<JobContext, 'jobId'>
): Promise<void> {
	const handle = handlers[name];
	for (let k = 0; k < consumers(name); k++) {
		await boss.work(name, { batchSize: 1, pollingIntervalSeconds: POLL_S }, async ([job]) => {
			await handle(jobData(name, job.data), { ...context, jobId: job.id });
		});
	}
}

let complainedAt = 0;

/** One line a second at most: a database that is away would fill the disk with the same sentence. */
function complain(what: string): (fault: unknown) => void {
	return (fault) => {
		if (performance.now() - complainedAt < 1000) return;
		complainedAt = performance.now();
		const message = fault instanceof Error ? fault.message : String(fault);
		process.stderr.write(`worker, ${what}: ${message}\n`);
	};
}
