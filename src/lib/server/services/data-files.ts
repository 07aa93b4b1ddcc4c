import type { Readable } from 'node:stream';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import type { DataReading, DataRefusal } from '$lib/schemas/data-state';
import type { DataFormat, DataKind, DataState } from '$lib/schemas/enumerations';
import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, NotFound } from '$lib/server/errors';
import { DataFile } from '$lib/server/models/data-file';
import type { Person } from '$lib/server/models/person';
import { Session } from '$lib/server/models/session';
import { Sorting } from '$lib/server/models/sorting';
import { knownId } from '$lib/server/known-id';
import { parsed } from '$lib/server/parsed';
import { record } from '$lib/server/record';
import { storage } from '$lib/server/storage';
import { limited } from '$lib/server/storage/limit';
import { look } from './file-beginning';

export interface DataFileView {
	id: string;
	sessionId: string;
	kind: DataKind;
	name: string;
	format: DataFormat;
	bytes: number;
	sha256: string;
	state: DataState;
	rows: number | null;
	columns: string[] | null;
	reading: DataReading;
	warnings: string[];
	refusal: DataRefusal | null;
	uploadedBy: string;
	uploadedAt: string;
	withdrawn: { at: string; why: string } | null;
}

const subject = (id: string) => ({ kind: 'data-file', id });

const withUploader = { association: 'uploader', attributes: ['name'] };

/** Files of a session in the order they came. */
export async function list(by: Actor | null, sessionId: string): Promise<DataFileView[]> {
	demand(by, 'data.read');
	const rows = await DataFile.findAll({
		where: { sessionId },
		include: withUploader,
		order: ['uploadedAt', 'id']
	});
	return rows.map(toView);
}

export async function get(
	by: Actor | null,
	id: string,
	{ session }: { session?: string } = {}
): Promise<DataFileView> {
	demand(by, 'data.read');
	const row = await DataFile.findByPk(knownId(id), { include: withUploader });
	if (!row || (session && row.sessionId !== session)) throw new NotFound();
	return toView(row);
}

/**
 * Keeps an original and looks at its beginning; nothing is read into the record yet.
 * A file that is no table is kept as refused, so that one can see what was sent. The same content
 * sent again for the same purpose is the file that is there.
 * @param kind what it holds; told from its header when left out, for a person to confirm
 * @throws TooLarge over the lab's limit; whatever a broken stream throws. Then nothing is kept.
 */
export async function receive(
	by: Actor | null,
	{
		sessionId,
		kind = null,
		name,
		content
	}: { sessionId: string; kind?: DataKind | null; name: string; content: Readable }
): Promise<DataFileView> {
	demand(by, 'sessions.write');
	const uploadedBy = personOf(by);
	await refuseClosed(sessionId);
	const kept = await storage().put(limited(content));
	const originalName = name.trim().slice(0, 255) || 'unnamed';
	const { refusal, ...beginning } = await look(kept, originalName, kind);
	const id = await record(by, async (w) => {
		// Locked, so that the same content sent twice at once becomes one file.
		await Session.findByPk(sessionId, { transaction: w.t, lock: true });
		const same = await DataFile.findOne({
			where: { sessionId, sha256: kept.sha256, kind: beginning.kind, withdrawnAt: null },
			transaction: w.t
		});
		if (same) {
			await w.log('data-file.receive-again', subject(same.id));
			return same.id;
		}
		const row = await DataFile.create(
			{
				...beginning,
				...kept,
				sessionId,
				originalName,
				uploadedBy,
				state: refusal ? 'refused' : 'received',
				refusal
			},
			{ transaction: w.t }
		);
		const { kind: told } = beginning;
		await w.log('data-file.receive', subject(row.id), { ...kept, sessionId, kind: told });
		return row.id;
	});
	return get(by, id);
}

/** Looks at a file again as one of another kind, when the header was taken for the wrong one. */
export async function lookAgain(by: Actor | null, id: string, kind: DataKind): Promise<void> {
	demand(by, 'sessions.write');
	const file = await get(by, id);
	const { refusal, ...beginning } = await look(file, file.name, kind);
	await record(by, async (w) => {
		const [changed] = await DataFile.update(
			{ ...beginning, state: refusal ? 'refused' : 'received', refusal },
			{ where: { id, state: ['received', 'refused'], withdrawnAt: null }, transaction: w.t }
		);
		if (changed === 0) {
			throw new Conflict('taken-in', 'This file is taken in or withdrawn, and stays what it is.');
		}
		await w.log('data-file.look-again', subject(id), { kind });
	});
}

async function refuseClosed(sessionId: string): Promise<void> {
	const session = await Session.findByPk(knownId(sessionId));
	if (!session) throw new NotFound();
	if (!session.withdrawnAt) return;
	throw new Conflict('withdrawn', 'This session is withdrawn and takes no files.');
}

/** The original, byte for byte. */
export async function original(
	by: Actor | null,
	id: string,
	{ session }: { session?: string } = {}
): Promise<{ name: string; bytes: number; content: Readable }> {
	const { name, bytes, sha256 } = await get(by, id, { session });
	return { name, bytes, content: await storage().read(sha256) };
}

/** Takes a file out of use, with the sorting made of it. Its original and finished analyses stay. */
export async function withdraw(by: Actor | null, id: string, input: unknown): Promise<void> {
	demand(by, 'sessions.write');
	const { why } = parsed(withdrawalSchema, input);
	await record(by, async (w) => {
		const row = await DataFile.findByPk(id, { transaction: w.t, lock: true });
		if (!row) throw new NotFound();
		if (row.withdrawnAt) throw new Conflict('withdrawn', 'This file is withdrawn already.');
		const standing = { withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: why };
		await row.update(standing, { transaction: w.t });
		await Sorting.update(standing, {
			where: { dataFileId: id, withdrawnAt: null },
			transaction: w.t
		});
		await w.log('data-file.withdraw', subject(id), { why });
	});
}

function toView(row: DataFile & { uploader?: Person }): DataFileView {
	const { withdrawnAt, withdrawnWhy } = row;
	return {
		id: row.id,
		sessionId: row.sessionId,
		kind: row.kind,
		name: row.originalName,
		format: row.format,
		bytes: Number(row.bytes),
		sha256: row.sha256,
		state: row.state,
		rows: row.rowCount === null || row.rowCount === undefined ? null : Number(row.rowCount),
		columns: row.columns ?? null,
		reading: row.reading ?? {},
		warnings: row.warnings ?? [],
		refusal: row.refusal ?? null,
		uploadedBy: row.uploader?.name ?? '',
		uploadedAt: row.uploadedAt.toISOString(),
		withdrawn:
			withdrawnAt && withdrawnWhy ? { at: withdrawnAt.toISOString(), why: withdrawnWhy } : null
	};
}
