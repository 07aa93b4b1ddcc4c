import { Op } from 'sequelize';
import type { FieldValue, FieldValues } from '$lib/schemas/register-descriptor';
import { isRegisterKind, registers, type RegisterKind } from '$lib/schemas/registers';
import { demand, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, NotFound, Stale } from '$lib/server/errors';
import { parsed } from '$lib/server/parsed';
import { record, type Write } from '$lib/server/record';
import { today } from './lab-clock';
import * as members from './members';
import { registerTables, type Row } from './register-tables';

/** One row of any register: what its form and its columns show, and how it stands. */
export interface RegisterRow {
	id: string;
	revision: number;
	values: FieldValues;
	withdrawn: { at: string; why: string } | null;
}

/** A row as a select offers it. */
export interface RegisterChoice {
	value: string;
	label: string;
}

export async function list(
	by: Actor | null,
	kind: RegisterKind,
	{ isWithWithdrawn = false } = {}
): Promise<RegisterRow[]> {
	demand(by, 'registers.read');
	const { model, orderBy, include } = registerTables[kind];
	const found = await model.findAll({
		where: isWithWithdrawn ? {} : { withdrawnAt: null },
		include,
		order: [orderBy]
	});
	return toRows(
		kind,
		found.map((row) => row.get({ plain: true }))
	);
}

export async function get(by: Actor | null, kind: RegisterKind, id: string): Promise<RegisterRow> {
	demand(by, 'registers.read');
	const { model, include } = registerTables[kind];
	const found = await model.findByPk(id, { include });
	if (!found) throw new NotFound();
	const [row] = await toRows(kind, [found.get({ plain: true })]);
	return row;
}

/** What may be chosen now: rows in use, under the name people know them by. */
export async function choices(by: Actor | null, kind: RegisterKind): Promise<RegisterChoice[]> {
	const { nameField } = registers[kind];
	const rows = await list(by, kind);
	return rows.map(({ id, values }) => ({
		value: id,
		label: [values[nameField], values.title ?? values.designName].filter(Boolean).join(', ')
	}));
}

/** For every field of a register's form that chooses a row or people: what it offers. */
export async function fieldChoices(
	by: Actor | null,
	kind: RegisterKind
): Promise<Record<string, RegisterChoice[]>> {
	demand(by, 'registers.read');
	const { fields } = registers[kind];
	const offered = fields.map(async ({ name, kind, from }) => {
		if (kind === 'people') return [name, await peopleChoices(by)] as const;
		return [name, from && isRegisterKind(from) ? await choices(by, from) : []] as const;
	});
	return Object.fromEntries((await Promise.all(offered)).filter(([, rows]) => rows.length > 0));
}

async function peopleChoices(by: Actor): Promise<RegisterChoice[]> {
	const people = await members.list(by);
	return people
		.filter((person) => !person.deactivatedAt)
		.map(({ id, name }) => ({ value: id, label: name }));
}

export async function create(
	by: Actor | null,
	kind: RegisterKind,
	input: Record<string, unknown>
): Promise<{ id: string }> {
	demand(by, 'registers.write');
	const { model, subject, toColumns, follow } = registerTables[kind];
	const { revision: _, ...values } = parsed(registers[kind].schema, input);
	return record(by, async (w) => {
		const row = await model.create(toColumns(values), { transaction: w.t });
		const id = String(row.get('id'));
		await follow(w, id, values, await today());
		await w.log(`${subject}.create`, { kind: subject, id }, { name: nameOf(kind, values) });
		return { id };
	});
}

/** @throws Conflict `stale` when the row was changed since the form was opened */
export async function edit(
	by: Actor | null,
	kind: RegisterKind,
	id: string,
	input: Record<string, unknown>
): Promise<void> {
	demand(by, 'registers.write');
	const { model, subject, toColumns, follow } = registerTables[kind];
	const { revision, ...values } = parsed(registers[kind].schema, input);
	await record(by, async (w) => {
		const [changed] = await model.update(
			{ ...toColumns(values), revision: Number(revision) + 1 },
			{ where: { id, revision, withdrawnAt: null }, transaction: w.t }
		);
		if (changed === 0) await explainMiss(kind, id, w);
		await follow(w, id, values, await today());
		await w.log(`${subject}.edit`, { kind: subject, id }, { name: nameOf(kind, values) });
	});
}

/** Takes a row out of use; what refers to it keeps it. */
export async function withdraw(by: Actor | null, kind: RegisterKind, id: string, why: string) {
	demand(by, 'registers.write');
	const standing = { withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: why };
	await stand(by, kind, id, 'withdraw', standing, null);
}

export async function restore(by: Actor | null, kind: RegisterKind, id: string) {
	demand(by, 'registers.write');
	const standing = { withdrawnAt: null, withdrawnBy: null, withdrawnWhy: null };
	await stand(by, kind, id, 'restore', standing, { [Op.not]: null });
}

async function stand(
	by: Actor,
	kind: RegisterKind,
	id: string,
	verb: 'withdraw' | 'restore',
	standing: { withdrawnWhy: string | null },
	withdrawnAt: object | null
): Promise<void> {
	const { model, subject } = registerTables[kind];
	await record(by, async (w) => {
		const where = { id, withdrawnAt };
		const [changed] = await model.update(standing, { where, transaction: w.t });
		if (changed === 0) await explainMiss(kind, id, w);
		const detail = standing.withdrawnWhy ? { why: standing.withdrawnWhy } : {};
		await w.log(`${subject}.${verb}`, { kind: subject, id }, detail);
	});
}

/** Why no row took a change. */
async function explainMiss(kind: RegisterKind, id: string, { t }: Write): Promise<never> {
	const row = await registerTables[kind].model.findByPk(id, { transaction: t });
	if (!row) throw new NotFound();
	const { singular } = registers[kind];
	if (row.get('withdrawnAt')) {
		throw new Conflict('withdrawn', `This ${singular} is withdrawn. Restore it to change it.`);
	}
	throw new Stale(singular);
}

async function toRows(kind: RegisterKind, found: Row[]): Promise<RegisterRow[]> {
	const lookedUp = await registerTables[kind].lookUp(found, await today());
	const names = Object.keys(registers[kind].schema.shape);
	return found.map((row) => ({
		id: row.id,
		revision: Number(row.revision),
		values: {
			...Object.fromEntries(names.map((name) => [name, fieldValue(row[name])])),
			...lookedUp.get(row.id)
		},
		withdrawn:
			row.withdrawnAt instanceof Date
				? { at: row.withdrawnAt.toISOString(), why: String(row.withdrawnWhy) }
				: null
	}));
}

function fieldValue(value: unknown): FieldValue {
	if (typeof value === 'string' || typeof value === 'number' || typeof value === 'boolean') {
		return value;
	}
	return null;
}

const nameOf = (kind: RegisterKind, values: FieldValues) => values[registers[kind].nameField];
