import { setTimeout as sleep } from 'node:timers/promises';
import pg from 'pg';
import { settings } from '$lib/server/settings';

/** Pauses before a statement is sent again on a new connection. */
const PAUSES_MS = [100, 500, 1000, 2000];

/** SQLSTATE classes of a connection that failed or was ended by the server. */
const LOST = /^(08|57P0)/;
const LOST_BY_SYSTEM = new Set(['ECONNRESET', 'ECONNREFUSED', 'EPIPE', 'ETIMEDOUT']);

export interface QueueConnection {
	/** What pg-boss asks for in place of a pool of its own. */
	executeSql(text: string, values?: unknown[]): Promise<Pick<pg.QueryResult, 'rows' | 'rowCount'>>;
	close(): Promise<void>;
}

/**
 * Connections of the worker's queue. pg-boss tells the database that a job is done or failed without
 * waiting for the answer, so a connection lost just then would end the process by a rejection nobody
 * hears. Here such a statement is sent again: its statements change a job only in the state they
 * expect, and a job fetched twice expires and is handed out anew.
 * @param onError told of idle connections that break
 */
export function queueConnection(onError: (fault: unknown) => void): QueueConnection {
	const pool = new pg.Pool({
		connectionString: settings().databaseUrl,
		application_name: 'quarterturn-worker',
		max: 4
	});
	pool.on('error', onError);
	let isOpen = true;
	return {
		async executeSql(text, values) {
			// A job that was laid down at the stop still reports; its queue has handed it on.
			for (let tried = 0; isOpen; tried++) {
				try {
					return await pool.query(text, values);
				} catch (fault) {
					if (tried >= PAUSES_MS.length || !isLost(fault)) throw fault;
					await sleep(PAUSES_MS[tried]);
				}
			}
			return { rows: [], rowCount: 0 };
		},
		close() {
			isOpen = false;
			return pool.end();
		}
	};
}

function isLost(fault: unknown): boolean {
	if (!(fault instanceof Error)) return false;
	const code = 'code' in fault ? String(fault.code) : '';
	return (
		LOST.test(code) || LOST_BY_SYSTEM.has(code) || fault.message.startsWith('Connection terminated')
	);
}
