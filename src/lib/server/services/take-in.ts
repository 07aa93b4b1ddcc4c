import { QueryTypes, type Transaction } from 'sequelize';
import { takeInSchema, type TakeIn } from '$lib/schemas/data-file';
import type { DataReading, DataRefusal } from '$lib/schemas/data-state';
import { sortingDetailSchema } from '$lib/schemas/sorting';
import { demand, type Actor } from '$lib/server/access';
import { db } from '$lib/server/db';
import { Conflict, Invalid, NotFound, RefusedFile } from '$lib/server/errors';
import type { ReadTableInput, ReadTableOutput, Span } from '$lib/server/jobs/tasks/read-table-task';
import { inThread } from '$lib/server/jobs/threads';
import { Arena } from '$lib/server/models/arena';
import { DataFile } from '$lib/server/models/data-file';
import { Session } from '$lib/server/models/session';
import { Sorting } from '$lib/server/models/sorting';
import { SortingSession } from '$lib/server/models/sorting-session';
import { knownId } from '$lib/server/known-id';
import { parsed } from '$lib/server/parsed';
import { record, type Write } from '$lib/server/record';
import { requestWhenReady } from './analyses';
import * as dataFiles from './data-files';
import { putEpochs } from './sessions';
import * as sortings from './sortings';
import { putUnitFacts } from './unit-facts';

type Table = Exclude<ReadTableOutput, { refused: DataRefusal }>;

const subject = (id: string) => ({ kind: 'data-file', id });

/**
 * Reads a received file whole and adds it to the record: all of it in one transaction, or a refusal
 * on the file's row that says where it is wrong. When positions and spikes are then both there, the
 * standard analysis is asked for.
 * @param input how to read it; columns under their contract names need nothing said
 * @returns the file, taken in or refused
 */
export async function takeIn(
	by: Actor | null,
	id: string,
	input: unknown = {}
): Promise<dataFiles.DataFileView> {
	demand(by, 'sessions.write');
	const choice = parsed(takeInSchema, input);
	const file = await DataFile.findByPk(knownId(id));
	if (!file) throw new NotFound();
	if (file.withdrawnAt) throw new Conflict('withdrawn', 'This file is withdrawn.');
	if (file.state === 'taken-in') return dataFiles.get(by, id);
	await refuseSecond(file, choice);
	const order = await orderOf(file, choice);
	const table = await inThread('read-table', order);
	if ('refused' in table) await refuse(by, file, choice, table.refused);
	else await commit(by, file, choice, table, order);
	return dataFiles.get(by, id);
}

/**
 * Receives and takes in at once, for programs.
 * @throws RefusedFile with the reason, row and column when the file cannot be used; it stays as refused
 */
export async function put(
	by: Actor | null,
	sent: Parameters<typeof dataFiles.receive>[1],
	input: unknown = {}
): Promise<dataFiles.DataFileView> {
	const received = await dataFiles.receive(by, sent);
	// Sent again, a table that was refused for how it was read is read anew.
	const isTable = received.refusal?.code !== 'not-a-table';
	const file = isTable ? await takeIn(by, received.id, input) : received;
	if (file.refusal) throw new RefusedFile(file.refusal);
	return file;
}

/** Said before the work of reading; the database says it again at the end, for two at once. */
async function refuseSecond(file: DataFile, { sortingId }: TakeIn): Promise<void> {
	if (file.kind === 'position') {
		const other = await positionInForce(file.sessionId);
		if (other) {
			throw new Conflict(
				'position-present',
				`The session has positions already (${other.originalName}). Withdraw them first; the originals of both stay.`
			);
		}
	}
	if (file.kind === 'spikes' && sortingId) await announced(sortingId, file.sessionId);
	if (
		file.kind === 'units' &&
		!(await db().transaction((t) => sortings.currentOf(file.sessionId, t)))
	) {
		throw new Conflict(
			'no-sorting',
			'Take in the spikes first; then this can say more of their units.'
		);
	}
}

async function announced(id: string, sessionId: string, t?: Transaction): Promise<Sorting> {
	const sorting = await Sorting.findByPk(id, { transaction: t, lock: t && true });
	const covers = await SortingSession.count({
		where: { sortingId: id, sessionId },
		transaction: t
	});
	if (!sorting || sorting.withdrawnAt || covers === 0) throw new NotFound();
	if (sorting.dataFileId === null) return sorting;
	throw new Conflict(
		'sorting-has-spikes',
		'This sorting has its spikes already. A new cut is a new sorting; it can supersede this one.'
	);
}

const positionInForce = (sessionId: string) =>
	DataFile.findOne({
		where: { sessionId, kind: 'position', state: 'taken-in', withdrawnAt: null }
	});

async function orderOf(file: DataFile, choice: TakeIn): Promise<ReadTableInput> {
	const { decimal, mapping, pxPerCm, labelsFileId } = choice;
	const session = await Session.findByPk(file.sessionId, { rejectOnEmpty: true });
	const arena = session.arenaId ? await Arena.findByPk(session.arenaId) : null;
	const labels = labelsFileId
		? await DataFile.findOne({ where: { id: labelsFileId, sessionId: file.sessionId } })
		: null;
	if (labelsFileId && !labels) {
		throw new Invalid([{ field: 'labelsFileId', message: 'There is no such file here.' }]);
	}
	const scale = pxPerCm ?? (arena?.pxPerCm ? Number(arena.pxPerCm) : undefined);
	return {
		kind: file.kind,
		sha256: file.sha256,
		bytes: Number(file.bytes),
		...(decimal && { decimal }),
		...(mapping && { mapping }),
		...(scale && { pxPerCm: scale }),
		...(labels && { labelsSha256: labels.sha256 }),
		...(file.kind === 'spikes' && { positionSpan: await spanOfPositions(file.sessionId) })
	};
}

async function spanOfPositions(sessionId: string): Promise<Span | undefined> {
	return (await positionInForce(sessionId))?.reading.found;
}

/** The first and last spike of the session's sortings in force. */
async function spanOfSpikes(sessionId: string): Promise<Span | null> {
	const [row] = await db().query<{ firstS: number | null; lastS: number | null }>(
		`SELECT min(u.first_spike_s) AS "firstS", max(u.last_spike_s) AS "lastS"
		FROM sorting_session c
		JOIN sorting s ON s.id = c.sorting_id AND s.withdrawn_at IS NULL
		JOIN unit u ON u.sorting_id = s.id
		WHERE c.session_id = $sessionId`,
		{ bind: { sessionId }, type: QueryTypes.SELECT }
	);
	return row.firstS === null || row.lastS === null
		? null
		: { firstS: row.firstS, lastS: row.lastS };
}

function readingOf(
	file: DataFile,
	{ decimal, mapping, pxPerCm, labelsFileId }: TakeIn
): DataReading {
	return { ...file.reading, chosen: { decimal, mapping, pxPerCm, labelsFileId } };
}

async function refuse(
	by: Actor,
	file: DataFile,
	choice: TakeIn,
	refusal: DataRefusal
): Promise<void> {
	await record(by, async (w) => {
		const where = { id: file.id, state: ['received', 'refused'] };
		const reading = readingOf(file, choice);
		await DataFile.update({ state: 'refused', refusal, reading }, { where, transaction: w.t });
		await w.log('data-file.refuse', subject(file.id), { ...refusal });
	});
}

async function commit(
	by: Actor,
	file: DataFile,
	choice: TakeIn,
	table: Table,
	order: ReadTableInput
): Promise<void> {
	if (table.kind === 'position') {
		const spikes = await spanOfSpikes(file.sessionId);
		if (spikes && (spikes.firstS > table.span.lastS || spikes.lastS < table.span.firstS)) {
			const { firstS, lastS } = table.span;
			const message = `Positions from ${firstS} to ${lastS} s and spikes from ${spikes.firstS} to ${spikes.lastS} s share no moment. Are both in seconds on the recorder’s clock?`;
			return refuse(by, file, choice, { code: 'no-overlap', message, row: null, column: null });
		}
	}
	await record(by, async (w) => {
		// Locked, so that positions and spikes taken in at once see each other.
		await Session.findByPk(file.sessionId, { transaction: w.t, lock: true });
		const row = await DataFile.findByPk(file.id, { transaction: w.t, rejectOnEmpty: true });
		if (row.state === 'taken-in' || row.withdrawnAt) {
			throw new Conflict('stale', 'Somebody took in or withdrew this file meanwhile.');
		}
		const { found, warnings, isAnalysed = true } = await commitTable(by, row, choice, table, w);
		await row.update(
			{
				state: 'taken-in',
				refusal: null,
				rowCount: table.rows,
				columns: row.reading.recognised?.header ?? null,
				reading: { ...readingOf(row, choice), ...(found && { found }) },
				warnings: [...warnings, ...decimalWarning(row, order)],
				...(table.kind === 'position' && { parsedSha256: table.trackSha256 })
			},
			{ transaction: w.t }
		);
		await w.log('data-file.take-in', subject(row.id), { kind: row.kind, rows: table.rows });
		if (isAnalysed) await requestWhenReady(w, by, row.sessionId);
	});
}

async function commitTable(
	by: Actor,
	file: DataFile,
	choice: TakeIn,
	table: Table,
	w: Write
): Promise<{ found?: DataReading['found']; warnings: string[]; isAnalysed?: boolean }> {
	switch (table.kind) {
		case 'position':
			return { found: table.span, warnings: table.warnings };
		case 'spikes': {
			const sortingId = await sortingFor(by, file, choice, w);
			await sortings.putUnits(w, sortingId, table.units);
			const { span, units, warnings } = table;
			return { found: { ...span, units: units.length, warnings }, warnings };
		}
		case 'units': {
			const { warnings, hasPlaced } = await putUnitFacts(w, file.sessionId, table.units);
			return { warnings, isAnalysed: hasPlaced };
		}
		case 'epochs':
			await putEpochs(by, file.sessionId, table.epochs, w);
			return { warnings: [] };
	}
}

/** The announced sorting, or a new one of this session alone. */
async function sortingFor(by: Actor, file: DataFile, choice: TakeIn, w: Write): Promise<string> {
	if (choice.sortingId) {
		const sorting = await announced(choice.sortingId, file.sessionId, w.t);
		await sorting.update({ dataFileId: file.id }, { transaction: w.t });
		return sorting.id;
	}
	const session = await Session.findByPk(file.sessionId, { transaction: w.t, rejectOnEmpty: true });
	const detail = sortingDetailSchema.parse(choice.sorting ?? {});
	return sortings.add(w, by, [session], detail, file.id);
}

/** Nobody was asked when a program sent the file, so the row says how it was read. */
function decimalWarning(file: DataFile, order: ReadTableInput): string[] {
	const isComma = file.reading.recognised?.decimal === ',' && order.decimal === undefined;
	return isComma ? ['Numbers were read with decimal commas.'] : [];
}
