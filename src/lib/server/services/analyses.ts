import { isDeepStrictEqual } from 'node:util';
import type { Readable } from 'node:stream';
import { Op } from 'sequelize';
import { ANALYSIS_VERSION } from '$lib/analysis/version';
import type { AnalysisResult } from '$lib/analysis/session/analysis-result';
import type { SessionParameters } from '$lib/analysis/session/parameters';
import { analysisParametersSchema, type AnalysisChoices } from '$lib/schemas/analysis-parameters';
import type { AnalysisState } from '$lib/schemas/enumerations';
import { demand, may, type Actor } from '$lib/server/access';
import { Conflict, Invalid, NotFound } from '$lib/server/errors';
import { Analysis } from '$lib/server/models/analysis';
import { DataFile } from '$lib/server/models/data-file';
import { Session } from '$lib/server/models/session';
import { Sorting } from '$lib/server/models/sorting';
import { SortingSession } from '$lib/server/models/sorting-session';
import { knownId } from '$lib/server/known-id';
import { parsed } from '$lib/server/parsed';
import { record, type Write } from '$lib/server/record';
import { settings } from '$lib/server/settings';
import { readPart } from '$lib/server/storage/result-parts';
import { plan, type Plan } from './analysis-plan';
import { SUMMARY_COLUMNS, toSummary, type AnalysisSummary } from './session-views';
import { currentOf } from './sortings';

export interface AnalysisView extends AnalysisSummary {
	sessionId: string;
	arenaName: string;
	parameters: SessionParameters;
	analysisVersion: string;
	codeVersion: string;
	startedAt: string | null;
	isCurrent: boolean;
	/** Digest of the arrays that pages draw; null until done. */
	arraysSha256: string | null;
	result: AnalysisResult | null;
}

const subject = (id: string) => ({ kind: 'analysis', id });

/** Analyses of a session, newest first, without their results. */
export async function list(by: Actor | null, sessionId: string): Promise<AnalysisSummary[]> {
	demand(by, 'data.read');
	const rows = await Analysis.findAll({
		where: { sessionId },
		attributes: [...SUMMARY_COLUMNS],
		order: [['askedAt', 'DESC']]
	});
	return rows.map(toSummary);
}

/** @param session when given, an analysis of another session is not found */
export async function get(
	by: Actor | null,
	id: string,
	{ session }: { session?: string } = {}
): Promise<AnalysisView> {
	demand(by, 'data.read');
	const row = await Analysis.findByPk(knownId(id));
	if (!row || (session && row.sessionId !== session)) throw new NotFound();
	const of = await Session.findByPk(row.sessionId, { attributes: ['currentAnalysisId'] });
	return {
		...toSummary(row),
		sessionId: row.sessionId,
		arenaName: row.setup.arenaName,
		parameters: row.parameters,
		analysisVersion: row.analysisVersion,
		codeVersion: row.codeVersion,
		startedAt: row.startedAt?.toISOString() ?? null,
		isCurrent: of?.currentAnalysisId === id,
		arraysSha256: row.arraysSha256 ?? null,
		result: row.result ?? null
	};
}

/** How far an analysis is: what a page polls when it cannot listen. */
export async function standing(by: Actor | null, id: string): Promise<AnalysisSummary> {
	demand(by, 'data.read');
	const row = await Analysis.findByPk(knownId(id), { attributes: [...SUMMARY_COLUMNS] });
	if (!row) throw new NotFound();
	return toSummary(row);
}

/**
 * Asks for an analysis; a worker computes it. What was asked for already, with the same inputs and
 * parameters, is that analysis: computing it again would give the same figures.
 * @param choices parameters that differ from the defaults of `session@1` and of the arena
 */
export async function request(
	by: Actor | null,
	sessionId: string,
	choices: unknown = {},
	{ sortingId }: { sortingId?: string } = {}
): Promise<{ id: string; state: AnalysisState }> {
	demand(by, 'sessions.write');
	const given = parsed(analysisParametersSchema, choices);
	return record(by, async (w) => {
		const inputs = await inputsOf(sessionId, sortingId, w);
		if ('lacks' in inputs) {
			throw new Conflict('inputs-missing', `${inputs.lacks} Take that in first; then ask again.`);
		}
		return add(w, by, inputs, given);
	});
}

/**
 * Asks for the standard analysis once a session has both positions and spikes. A session without an
 * arena waits for one.
 */
export async function requestWhenReady(w: Write, by: Actor, sessionId: string): Promise<void> {
	const inputs = await inputsOf(sessionId, undefined, w);
	if ('lacks' in inputs) return;
	try {
		await add(w, by, inputs, {});
	} catch (fault) {
		if (!(fault instanceof Conflict && fault.code === 'no-arena')) throw fault;
	}
}

interface Inputs {
	session: Session;
	position: DataFile;
	spikes: { sortingId: string; sha256: string };
}

async function inputsOf(
	sessionId: string,
	sortingId: string | undefined,
	{ t }: Write
): Promise<Inputs | { lacks: string }> {
	const session = await Session.findByPk(knownId(sessionId), { transaction: t });
	if (!session) throw new NotFound();
	if (session.withdrawnAt) throw new Conflict('withdrawn', 'This session is withdrawn.');
	const position = await DataFile.findOne({
		where: { sessionId, kind: 'position', state: 'taken-in', withdrawnAt: null },
		transaction: t
	});
	if (!position) return { lacks: 'The session has no positions yet.' };
	const chosen = sortingId ?? (await currentOf(sessionId, t));
	if (!chosen) return { lacks: 'The session has no sorted spikes yet.' };
	const covers = await SortingSession.count({
		where: { sortingId: chosen, sessionId },
		transaction: t
	});
	const sorting = await Sorting.findByPk(chosen, { transaction: t });
	if (covers === 0 || !sorting || sorting.withdrawnAt) {
		throw new Invalid([{ field: 'sortingId', message: 'No such sorting of this session.' }]);
	}
	const file = sorting.dataFileId
		? await DataFile.findByPk(sorting.dataFileId, { transaction: t })
		: null;
	if (!file) return { lacks: 'This sorting has no spikes yet.' };
	return { session, position, spikes: { sortingId: chosen, sha256: file.sha256 } };
}

async function add(
	w: Write,
	by: Actor,
	{ session, position, spikes }: Inputs,
	choices: AnalysisChoices
): Promise<{ id: string; state: AnalysisState }> {
	const { parameters, setup } = await plan(session, choices, w.t);
	const same = await equal(session.id, spikes.sortingId, position.id, { parameters, setup }, w);
	if (same) {
		await w.log('analysis.request-again', subject(same.id), { sessionId: session.id });
		return same;
	}
	const analysis = await Analysis.create(
		{
			sessionId: session.id,
			sortingId: spikes.sortingId,
			positionFileId: position.id,
			parameters,
			setup,
			positionSha256: position.sha256,
			spikesSha256: spikes.sha256,
			analysisVersion: ANALYSIS_VERSION,
			codeVersion: settings().version,
			askedBy: by.personId
		},
		{ transaction: w.t }
	);
	await w.enqueue('analyse', { analysisId: analysis.id });
	await w.log('analysis.request', subject(analysis.id), { sessionId: session.id });
	return { id: analysis.id, state: 'queued' };
}

/** An analysis of the same inputs that did not fail, asked for since the units were last described. */
async function equal(
	sessionId: string,
	sortingId: string,
	positionFileId: string,
	wanted: Plan,
	{ t }: Write
): Promise<{ id: string; state: AnalysisState } | null> {
	const described = await DataFile.max<Date | null, DataFile>('uploadedAt', {
		where: { sessionId, kind: 'units', state: 'taken-in', withdrawnAt: null },
		transaction: t
	});
	const earlier = await Analysis.findAll({
		where: {
			sessionId,
			sortingId,
			positionFileId,
			analysisVersion: ANALYSIS_VERSION,
			state: ['queued', 'running', 'done'],
			...(described && { askedAt: { [Op.gt]: described } })
		},
		attributes: ['id', 'state', 'parameters', 'setup'],
		order: [['askedAt', 'DESC']],
		transaction: t
	});
	const same = earlier.find(({ parameters, setup }) =>
		isDeepStrictEqual({ parameters, setup }, wanted)
	);
	return same ? { id: same.id, state: same.state } : null;
}

/** Tries a failed analysis again, with the same inputs and parameters. */
export async function retry(by: Actor | null, id: string): Promise<void> {
	demand(by, may(by, 'jobs.write') ? 'jobs.write' : 'sessions.write');
	await record(by, async (w) => {
		const row = await Analysis.findByPk(knownId(id), { transaction: w.t, lock: true });
		if (!row) throw new NotFound();
		if (row.state !== 'failed') {
			throw new Conflict('not-failed', 'Only an analysis that failed can be tried again.');
		}
		await row.update(
			{ state: 'queued', failure: null, progress: 0, attempts: 0, workerLock: null },
			{ transaction: w.t }
		);
		await w.enqueue('analyse', { analysisId: id });
		await w.log('analysis.retry', subject(id));
	});
}

/** A part of the arrays behind the figures of a page: `path`, `spikes` or `decoding`. */
export async function arrays(
	by: Actor | null,
	id: string,
	part: string,
	{ session }: { session?: string } = {}
): Promise<{ content: Readable; bytes: number; sha256: string }> {
	demand(by, 'data.read');
	const row = await Analysis.findByPk(knownId(id), { attributes: ['sessionId', 'arraysSha256'] });
	if (!row?.arraysSha256 || (session && row.sessionId !== session)) throw new NotFound();
	return { ...(await readPart(row.arraysSha256, part)), sha256: row.arraysSha256 };
}
