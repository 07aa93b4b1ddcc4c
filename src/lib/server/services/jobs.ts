import { QueryTypes } from 'sequelize';
import type { AnalysisFailure } from '$lib/schemas/data-state';
import type { AnalysisState } from '$lib/schemas/enumerations';
import { demand, may, type Actor } from '$lib/server/access';
import { db } from '$lib/server/db';
import { queueNames, type QueueName } from '$lib/server/jobs/queues';

export interface QueueCount {
	queue: QueueName;
	waiting: number;
	running: number;
	/** Given up by the queue in the last days. */
	failed: number;
	/** When the oldest waiting job was handed in. */
	waitingSince: string | null;
}

export interface AnalysisJob {
	id: string;
	state: Exclude<AnalysisState, 'done'>;
	progress: number;
	attempts: number;
	askedAt: string;
	startedAt: string | null;
	failure: AnalysisFailure | null;
	/** Where it belongs; null for readers who may not see animals' data. */
	session: { id: string; animal: string; day: string } | null;
}

export interface JobsView {
	queues: QueueCount[];
	analyses: AnalysisJob[];
	/** Workers that hold their lock now. */
	workers: number;
}

/** Newest failed analyses shown. */
const MOST_FAILED = 50;

export async function list(by: Actor | null): Promise<JobsView> {
	demand(by, 'jobs.read');
	const [counts, open, workers] = await Promise.all([queueCounts(), openAnalyses(), workerCount()]);
	const isForReading = may(by, 'data.read');
	return {
		queues: queueNames.map((queue) => {
			const row = counts.find((count) => count.queue === queue);
			return row ?? { queue, waiting: 0, running: 0, failed: 0, waitingSince: null };
		}),
		analyses: open.map(({ sessionId, animal, day, ...job }) => ({
			...job,
			session: isForReading ? { id: sessionId, animal, day } : null
		})),
		workers
	};
}

async function queueCounts(): Promise<QueueCount[]> {
	const rows = await db().query<Omit<QueueCount, 'waitingSince'> & { waitingSince: Date | null }>(
		`SELECT name AS queue,
			count(*) FILTER (WHERE state IN ('created', 'retry'))::int AS waiting,
			count(*) FILTER (WHERE state = 'active')::int AS running,
			count(*) FILTER (WHERE state = 'failed')::int AS failed,
			min(created_on) FILTER (WHERE state IN ('created', 'retry')) AS "waitingSince"
		FROM pgboss.job GROUP BY name`,
		{ type: QueryTypes.SELECT }
	);
	return rows.map((row) => ({ ...row, waitingSince: row.waitingSince?.toISOString() ?? null }));
}

type Row = Omit<AnalysisJob, 'session'> & { sessionId: string; animal: string; day: string };

async function openAnalyses(): Promise<Row[]> {
	const rows = await db().query<
		Omit<Row, 'askedAt' | 'startedAt'> & { askedAt: Date; startedAt: Date | null }
	>(
		`SELECT a.id, a.state, a.progress, a.attempts, a.asked_at AS "askedAt",
			a.started_at AS "startedAt", a.failure, a.session_id AS "sessionId",
			n.code AS animal, d.date::text AS day
		FROM analysis a
		JOIN session s ON s.id = a.session_id
		JOIN animal n ON n.id = s.animal_id
		JOIN day d ON d.id = s.day_id
		WHERE a.state IN ('queued', 'running') OR a.id IN (
			SELECT id FROM analysis WHERE state = 'failed' ORDER BY finished_at DESC LIMIT ${MOST_FAILED}
		)
		ORDER BY array_position(ARRAY['running', 'queued', 'failed'], a.state), a.asked_at DESC`,
		{ type: QueryTypes.SELECT }
	);
	return rows.map((row) => ({
		...row,
		askedAt: row.askedAt.toISOString(),
		startedAt: row.startedAt?.toISOString() ?? null
	}));
}

async function workerCount(): Promise<number> {
	const [row] = await db().query<{ workers: number }>(
		`SELECT count(*)::int AS workers FROM pg_stat_activity
		WHERE application_name = 'quarterturn-worker-lock' AND datname = current_database()`,
		{ type: QueryTypes.SELECT }
	);
	return row.workers;
}
