import { QueryTypes } from 'sequelize';
import { analysisResult } from '$lib/analysis/session/analysis-result';
import type { SessionResult } from '$lib/analysis/session/result';
import type { AnalysisFailure } from '$lib/schemas/data-state';
import { systemActor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { db } from '$lib/server/db';
import type { AnalyseInput } from '$lib/server/jobs/tasks/analyse-task';
import { Analysis } from '$lib/server/models/analysis';
import { DataFile } from '$lib/server/models/data-file';
import { Session } from '$lib/server/models/session';
import { Sorting } from '$lib/server/models/sorting';
import { Unit } from '$lib/server/models/unit';
import { record, type Write } from '$lib/server/record';

/** How often one analysis is begun before it counts as failed. */
export const MOST_ATTEMPTS = 3;
/** A queued analysis without a job in this time has lost it, for instance with the connection. */
const LOST_AFTER_S = 15;

/** One try of one analysis. What a later try has taken over, an earlier one cannot write to. */
export interface Run {
	id: string;
	attempt: number;
	lock: number;
	startedAt: Date;
	/** What the tables said when they were taken in. */
	warnings: string[];
	input: AnalyseInput;
}

const subject = (id: string) => ({ kind: 'analysis', id });

const ofRun = ({ id, attempt, lock }: Run) => ({
	id,
	state: 'running' as const,
	attempts: attempt,
	workerLock: lock
});

/** Begins an analysis, or answers null when it is done, withdrawn from the queue or running elsewhere. */
export async function begin(
	id: string,
	{ lock, jobId }: { lock: number; jobId: string }
): Promise<Run | null> {
	const startedAt = now();
	const [begun] = await Analysis.update(
		{
			state: 'running',
			progress: 0,
			workerLock: lock,
			jobId,
			startedAt,
			attempts: db().literal('attempts + 1')
		},
		{ where: { id, state: 'queued' } }
	);
	if (begun === 0) return null;
	const row = await Analysis.findByPk(id, { rejectOnEmpty: true });
	const [input, warnings] = await Promise.all([inputOf(row), spikeWarnings(row)]);
	return { id, attempt: row.attempts, lock, startedAt, warnings, input };
}

async function spikeWarnings({ sortingId }: Analysis): Promise<string[]> {
	const sorting = await Sorting.findByPk(sortingId, { rejectOnEmpty: true });
	const file = sorting.dataFileId ? await DataFile.findByPk(sorting.dataFileId) : null;
	return file?.reading.found?.warnings ?? [];
}

async function inputOf(row: Analysis): Promise<AnalyseInput> {
	const file = await DataFile.findByPk(row.positionFileId, { rejectOnEmpty: true });
	if (!file.parsedSha256) throw new Error(`Positions ${file.id} were taken in without a track`);
	const units = await Unit.findAll({
		where: { sortingId: row.sortingId },
		attributes: ['label', 'bundleLabel', 'spikes', 'class', 'amplitudeUv', 'noiseUv'],
		order: ['id']
	});
	return {
		track: { sha256: file.parsedSha256, samples: Number(file.rowCount) },
		units: units.map((unit) => ({
			unit: unit.label,
			bundle: unit.bundleLabel,
			spikes: unit.spikes,
			class: unit.class,
			amplitudeUv: unit.amplitudeUv,
			noiseUv: unit.noiseUv
		})),
		setup: row.setup,
		parameters: row.parameters
	};
}

export async function tell(run: Run, progress: number): Promise<void> {
	await Analysis.update({ progress }, { where: ofRun(run) });
}

/** Stores a result and makes it the session's current one. A run that was taken over stores nothing. */
export async function finish(
	run: Run,
	{ figures, arraysSha256 }: { figures: SessionResult; arraysSha256: string }
): Promise<void> {
	const finishedAt = now();
	const elapsedS = (finishedAt.getTime() - run.startedAt.getTime()) / 1000;
	const warnings = [...run.warnings, ...figures.warnings];
	await record(systemActor(), async (w) => {
		const row = await Analysis.findOne({ where: ofRun(run), transaction: w.t, lock: true });
		if (!row) return w.log('analysis.discard', subject(run.id), { attempt: run.attempt });
		const { decoding } = figures;
		await row.update(
			{
				state: 'done',
				progress: 1,
				finishedAt,
				workerLock: null,
				warnings,
				unitsUsed: decoding.unitsUsed,
				windows: decoding.windows,
				medianErrorCm: decoding.medianErrorCm,
				medianErrorLowCm: decoding.medianErrorCi95Cm?.[0] ?? null,
				medianErrorHighCm: decoding.medianErrorCi95Cm?.[1] ?? null,
				chanceMedianErrorCm: decoding.chanceMedianErrorCm,
				arraysSha256,
				result: analysisResult(
					{ ...figures, warnings },
					{
						positionSha256: row.positionSha256,
						spikesSha256: row.spikesSha256,
						// As the command line says it: the version that decides about figures.
						codeVersion: row.analysisVersion,
						startedAt: run.startedAt.toISOString(),
						elapsedS
					}
				)
			},
			{ transaction: w.t }
		);
		await Session.update(
			{ currentAnalysisId: row.id },
			{ where: { id: row.sessionId }, transaction: w.t }
		);
		await w.log('analysis.finish', subject(row.id), { attempt: run.attempt, elapsedS });
	});
}

/** The inputs are to blame: no further try would help. */
export async function refuse(run: Run, reason: { code: string; message: string }): Promise<void> {
	await end(run, { ...reason, canRetry: false });
}

/** A fault of ours or of the machine: tried again until the attempts are used up. */
export async function stumble(run: Run, fault: unknown): Promise<void> {
	const message = fault instanceof Error ? fault.message : String(fault);
	if (run.attempt >= MOST_ATTEMPTS) {
		await end(run, {
			code: 'computation-failed',
			message: `The computation failed ${run.attempt} times, last with: ${message}. The files are safe.`,
			canRetry: true
		});
		return;
	}
	await record(systemActor(), async (w) => {
		const row = await Analysis.findOne({ where: ofRun(run), transaction: w.t, lock: true });
		if (row) await queueAgain(row, w);
		await w.log('analysis.stumble', subject(run.id), { attempt: run.attempt, message });
	});
}

/** The worker stops: the try does not count, and the next worker begins it again. */
export async function lay(run: Run): Promise<void> {
	await record(systemActor(), async (w) => {
		const row = await Analysis.findOne({ where: ofRun(run), transaction: w.t, lock: true });
		if (row) {
			await row.update({ attempts: run.attempt - 1 }, { transaction: w.t });
			await queueAgain(row, w);
		}
		await w.log('analysis.lay-down', subject(run.id), { attempt: run.attempt });
	});
}

async function end(run: Run, failure: AnalysisFailure): Promise<void> {
	await record(systemActor(), async (w) => {
		await Analysis.update(
			{ state: 'failed', failure, finishedAt: now(), workerLock: null },
			{ where: ofRun(run), transaction: w.t }
		);
		await w.log('analysis.fail', subject(run.id), { attempt: run.attempt, code: failure.code });
	});
}

async function queueAgain(row: Analysis, w: Write): Promise<void> {
	await row.update({ state: 'queued', progress: 0, workerLock: null }, { transaction: w.t });
	await w.enqueue('analyse', { analysisId: row.id });
}

/**
 * Hands out again what nobody works on: analyses whose worker's lock is free or whose worker knows
 * nothing of them, and queued ones whose job was lost. Any worker may do this at any time.
 * @returns how many were handed out or given up
 */
export async function handOutOrphans(lock: number, running: ReadonlySet<string>): Promise<number> {
	const orphans = await db().query<Orphan>(
		`SELECT a.id, a.state, a.attempts FROM analysis a
		WHERE a.state = 'running'
			AND CASE WHEN a.worker_lock = $lock THEN a.id <> ALL ($running::uuid[])
				ELSE NOT EXISTS (
					SELECT 1 FROM pg_locks l
					WHERE l.locktype = 'advisory' AND l.objsubid = 1 AND l.granted
						AND l.database = (SELECT oid FROM pg_database WHERE datname = current_database())
						AND l.classid::bigint = a.worker_lock >> 32
						AND l.objid::bigint = a.worker_lock & 4294967295
				) END
		UNION ALL
		SELECT a.id, a.state, a.attempts FROM analysis a
		WHERE a.state = 'queued' AND a.asked_at < $before::timestamptz
			AND NOT EXISTS (
				SELECT 1 FROM pgboss.job j
				WHERE j.name = 'analyse' AND j.data ->> 'analysisId' = a.id::text
					AND (j.state IN ('created', 'retry')
						OR (j.state = 'active' AND j.started_on > $before::timestamptz))
			)`,
		{
			bind: {
				lock,
				running: [...running],
				before: new Date(now().getTime() - LOST_AFTER_S * 1000)
			},
			type: QueryTypes.SELECT
		}
	);
	for (const orphan of orphans) await handOut(orphan);
	return orphans.length;
}

interface Orphan {
	id: string;
	state: Analysis['state'];
	attempts: number;
}

async function handOut({ id, state, attempts }: Orphan): Promise<void> {
	await record(systemActor(), async (w) => {
		// Another worker may have been quicker: then the row no longer stands as it was seen.
		const where = { id, state, attempts };
		const row = await Analysis.findOne({ where, transaction: w.t, lock: true });
		if (row && state === 'running' && attempts >= MOST_ATTEMPTS) {
			const failure: AnalysisFailure = {
				code: 'worker-stopped',
				message: `The worker stopped ${attempts} times while computing this, perhaps for lack of memory. The files are safe.`,
				canRetry: true
			};
			await row.update(
				{ state: 'failed', failure, finishedAt: now(), workerLock: null },
				{ transaction: w.t }
			);
		} else if (row) {
			await queueAgain(row, w);
		}
		await w.log('analysis.hand-out', subject(id), { attempts });
	});
}
