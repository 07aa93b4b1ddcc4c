import { randomInt } from 'node:crypto';
import pg from 'pg';
import { settings } from '$lib/server/settings';

const RETRY_MS = 1000;

/**
 * An advisory lock held by a connection of its own for as long as this worker lives. PostgreSQL
 * frees it the moment the connection ends, so anybody can tell a dead worker's work from a slow one's.
 */
export interface WorkerLock {
	readonly number: number;
	release(): Promise<void>;
}

/** Takes a lock of a random number, and takes the same one again whenever the connection is lost. */
export async function holdWorkerLock(): Promise<WorkerLock> {
	const number = randomInt(1, 2 ** 47);
	let isReleased = false;
	let client: pg.Client | undefined;
	let timer: NodeJS.Timeout | undefined;

	async function take(): Promise<void> {
		const next = new pg.Client({
			connectionString: settings().databaseUrl,
			application_name: 'quarterturn-worker-lock',
			keepAlive: true
		});
		// An error is always followed by the end of the connection, which is handled below.
		next.on('error', () => undefined);
		next.on('end', () => {
			if (client === next) client = undefined;
			if (!isReleased) timer = setTimeout(retry, RETRY_MS);
		});
		await next.connect();
		await next.query('SELECT pg_advisory_lock($1)', [number]);
		client = next;
	}

	function retry(): void {
		take().catch(() => {
			if (!isReleased) timer = setTimeout(retry, RETRY_MS);
		});
	}

	await take();
	return {
		number,
		async release() {
			isReleased = true;
			clearTimeout(timer);
			await client?.end();
		}
	};
}
