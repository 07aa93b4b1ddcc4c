import type { Includeable } from 'sequelize';
import { reassignSchema, sessionEditSchema, sessionInputSchema } from '$lib/schemas/session';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, Invalid, NotFound, Stale } from '$lib/server/errors';
import { Day } from '$lib/server/models/day';
import { Epoch } from '$lib/server/models/epoch';
import { Session } from '$lib/server/models/session';
import { knownId } from '$lib/server/known-id';
import { parsed } from '$lib/server/parsed';
import { record, type Write } from '$lib/server/record';
import * as days from './days';
import { labClock } from './lab-clock';
import { animalOfCode } from './animal-of-code';
import { settled, settledEpochs, type EpochColumns } from './session-parts';
import {
	SUMMARY_COLUMNS,
	toRow,
	toView,
	type LoadedSession,
	type SessionRow,
	type SessionView
} from './session-views';
import { moveSortings } from './sortings';

function included(): Includeable[] {
	return [
		{ association: 'animal', required: true },
		{ association: 'day', required: true },
		{
			association: 'epochs',
			required: false,
			separate: true,
			where: { withdrawnAt: null },
			include: ['arena']
		},
		{
			association: 'files',
			separate: true,
			attributes: ['sessionId', 'kind', 'state', 'uploadedAt', 'withdrawnAt']
		},
		{ association: 'analyses', separate: true, attributes: [...SUMMARY_COLUMNS] },
		'arena',
		'rig',
		{ association: 'creator', attributes: ['name'] }
	];
}

/** Sessions of an animal, newest first; of one lab day when it is given. */
export async function list(
	by: Actor | null,
	{
		animal,
		day,
		isWithWithdrawn = false
	}: { animal: string; day?: string; isWithWithdrawn?: boolean }
): Promise<SessionRow[]> {
	demand(by, 'data.read');
	const { id: animalId } = await animalOfCode(animal);
	const rows = await Session.findAll({
		where: {
			animalId,
			...(!isWithWithdrawn && { withdrawnAt: null }),
			...(day && { '$day.date$': day })
		},
		include: included(),
		order: [['startsAt', 'DESC']]
	});
	return rows.map((row) => toRow(row as LoadedSession));
}

/** @param animal code under which it is asked for; another animal's session is not found */
export async function get(
	by: Actor | null,
	id: string,
	{ animal }: { animal?: string } = {}
): Promise<SessionView> {
	demand(by, 'data.read');
	const found = await Session.findByPk(knownId(id), { include: included() });
	if (!found) throw new NotFound();
	const view = toView(found as LoadedSession);
	if (animal && view.animal.toUpperCase() !== animal.toUpperCase()) throw new NotFound();
	return view;
}

/** @returns the id, and the lab day the session was put on */
export async function create(
	by: Actor | null,
	animalCode: string,
	input: unknown
): Promise<{ id: string; day: string }> {
	demand(by, 'sessions.write');
	const createdBy = personOf(by);
	const given = parsed(sessionInputSchema, input);
	const date = given.day ?? (await labClock()).dayOf(given.startsAt);
	return record(by, async (w) => {
		const animal = await animalOfCode(animalCode, w.t);
		const columns = await settled(given, w.t);
		const epochs = await settledEpochs(given.epochs, columns.arenaId, w.t);
		const day = await days.open(w, animal.id, date);
		const session = await Session.create(
			{
				...columns,
				animalId: animal.id,
				dayId: day.id,
				startsAt: given.startsAt,
				clockZeroAt: given.clockZeroAt ?? given.startsAt,
				note: given.note,
				createdBy
			},
			{ transaction: w.t }
		);
		await addEpochs(session.id, epochs, w);
		await w.log('session.create', subject(session.id), { animal: animal.code, day: date });
		return { id: session.id, day: date };
	});
}

/** @throws Stale when it was changed since `revision` */
export async function edit(by: Actor | null, id: string, input: unknown): Promise<void> {
	demand(by, 'sessions.write');
	const { revision, ...given } = parsed(sessionEditSchema, input);
	await record(by, async (w) => {
		const session = await locked(id, w);
		if (session.revision !== revision) throw new Stale('session');
		const columns = await settled(given, w.t);
		const epochs = await settledEpochs(given.epochs, columns.arenaId, w.t);
		const dayId = given.day ? await movedTo(session, given.day, w) : session.dayId;
		await session.update(
			{
				...columns,
				dayId,
				startsAt: given.startsAt,
				clockZeroAt: given.clockZeroAt ?? given.startsAt,
				note: given.note,
				revision: revision + 1
			},
			{ transaction: w.t }
		);
		await replaceEpochs(by, id, epochs, w);
		if (dayId !== session.previous('dayId')) {
			await moveSortings(id, { animalId: session.animalId, dayId }, w);
		}
		await w.log('session.edit', subject(id), { day: given.day, epochs: epochs.length });
	});
}

/** Epochs from a file take the place of those there are. */
export async function putEpochs(
	by: Actor,
	id: string,
	epochs: { name: string; kind: EpochColumns['kind']; startS: number; stopS: number }[],
	w: Write
): Promise<void> {
	const session = await locked(id, w);
	const rows = epochs.map((epoch) => ({ ...epoch, arena: null, configuration: '' }));
	await replaceEpochs(by, id, await settledEpochs(rows, session.arenaId, w.t), w);
	await session.increment('revision', { transaction: w.t });
}

/** Moves a session that was put on the wrong animal, with its sortings. */
export async function reassign(by: Actor | null, id: string, input: unknown): Promise<void> {
	demand(by, 'sessions.write');
	const { animal: code, why } = parsed(reassignSchema, input);
	await record(by, async (w) => {
		const session = await locked(id, w);
		const from = await Day.findByPk(session.dayId, { transaction: w.t, rejectOnEmpty: true });
		refuseSigned(from);
		const animal = await animalOfCode(code, w.t).catch((fault) => {
			if (!(fault instanceof NotFound)) throw fault;
			throw new Invalid([{ field: 'animal', message: fault.message }]);
		});
		if (animal.id === session.animalId) {
			const message = `The session belongs to ${animal.code} already.`;
			throw new Invalid([{ field: 'animal', message }]);
		}
		const day = await days.open(w, animal.id, from.date);
		refuseSigned(day);
		const before = session.animalId;
		const place = { animalId: animal.id, dayId: day.id };
		await session.update({ ...place, revision: session.revision + 1 }, { transaction: w.t });
		await moveSortings(id, place, w);
		await w.log('session.reassign', subject(id), { fromAnimalId: before, to: animal.code, why });
	});
}

export async function withdraw(by: Actor | null, id: string, input: unknown): Promise<void> {
	demand(by, 'sessions.write');
	const { why } = parsed(withdrawalSchema, input);
	await record(by, async (w) => {
		const session = await locked(id, w);
		refuseSigned(await Day.findByPk(session.dayId, { transaction: w.t, rejectOnEmpty: true }));
		await session.update(
			{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: why },
			{ transaction: w.t }
		);
		await w.log('session.withdraw', subject(id), { why });
	});
}

const subject = (id: string) => ({ kind: 'session', id });

/** The row held until the transaction ends, so that two writers cannot both think they are first. */
async function locked(id: string, { t }: Write): Promise<Session> {
	const session = await Session.findByPk(knownId(id), { transaction: t, lock: true });
	if (!session) throw new NotFound();
	if (session.withdrawnAt) {
		throw new Conflict('withdrawn', 'This session is withdrawn and stays as it was.');
	}
	return session;
}

function refuseSigned(day: { state: string; date: string }): void {
	if (day.state === 'draft') return;
	throw new Conflict(
		'day-signed',
		`The day ${day.date} is signed, so its sessions stay where they are. Nothing was changed.`
	);
}

async function movedTo(session: Session, date: string, w: Write): Promise<string> {
	const from = await Day.findByPk(session.dayId, { transaction: w.t, rejectOnEmpty: true });
	if (from.date === date) return from.id;
	refuseSigned(from);
	const day = await days.open(w, session.animalId, date);
	refuseSigned(day);
	return day.id;
}

async function addEpochs(sessionId: string, epochs: EpochColumns[], { t }: Write): Promise<void> {
	await Epoch.bulkCreate(
		epochs.map((epoch) => ({ sessionId, ...epoch })),
		{ transaction: t }
	);
}

async function replaceEpochs(
	by: Actor,
	sessionId: string,
	epochs: EpochColumns[],
	w: Write
): Promise<void> {
	const present = await Epoch.findAll({
		where: { sessionId, withdrawnAt: null },
		order: ['startS'],
		transaction: w.t
	});
	const isSame =
		present.length === epochs.length &&
		present.every(
			(row, k) =>
				row.name === epochs[k].name &&
				row.kind === epochs[k].kind &&
				Number(row.startS) === epochs[k].startS &&
				Number(row.stopS) === epochs[k].stopS &&
				row.arenaId === epochs[k].arenaId &&
				row.configuration === epochs[k].configuration
		);
	if (isSame) return;
	await Epoch.update(
		{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: 'the session was edited' },
		{ where: { sessionId, withdrawnAt: null }, transaction: w.t }
	);
	await addEpochs(sessionId, epochs, w);
}
