import { col, fn, Op, where } from 'sequelize';
import type { AnimalFacts } from '$lib/components/animal/animal-facts';
import type { DayCell } from '$lib/components/animal/day-strip';
import {
	animalFactsSchema,
	newAnimalSchema,
	type AnimalFactsInput,
	type NewAnimalInput
} from '$lib/schemas/animal';
import { readPastedAnimals, type PastedAnimals } from '$lib/schemas/animal-paste';
import type { AnimalStatus } from '$lib/schemas/enumerations';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { demand, may, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Invalid, NotFound, Stale } from '$lib/server/errors';
import { Animal } from '$lib/server/models/animal';
import { parsed } from '$lib/server/parsed';
import { record } from '$lib/server/record';
import { insertAnimal, type AnimalMarks } from './animal-intake';
import { animalOfCode } from './animal-of-code';
import { checkPaste } from './animal-paste-check';
import { stripCells } from './animal-strip';
import { stripFacts } from './animal-strip-facts';
import {
	rowIncludes,
	toHeader,
	toRow,
	toView,
	viewIncludes,
	type AnimalRow,
	type AnimalView
} from './animal-views';
import { labClock, today } from './lab-clock';

export async function list(
	by: Actor | null,
	filter: { status?: AnimalStatus; isWithWithdrawn?: boolean } = {}
): Promise<AnimalRow[]> {
	demand(by, 'animals.read');
	const day = await today();
	const animals = await Animal.findAll({
		where: {
			...(filter.status && { status: filter.status }),
			...(!filter.isWithWithdrawn && { withdrawnAt: null })
		},
		include: rowIncludes(day),
		order: ['code']
	});
	return animals.map((animal) => toRow(animal, day));
}

export async function get(by: Actor | null, code: string): Promise<AnimalView> {
	demand(by, 'animals.read');
	const { id } = await animalOfCode(code);
	const animal = await Animal.findByPk(id, { include: viewIncludes() });
	if (!animal) throw new NotFound();
	return toView(animal, await today());
}

export async function header(by: Actor | null, code: string): Promise<AnimalFacts> {
	return toHeader(await get(by, code));
}

/** One cell a lab day from the first surgery on; none without an implant. */
export async function strip(by: Actor | null, code: string): Promise<DayCell[]> {
	demand(by, 'animals.read');
	const animal = await animalOfCode(code);
	const clock = await labClock();
	const facts = await stripFacts(animal.id, clock.dayOf);
	// Welfare sees that there are days, not what the electrodes gave.
	const shown = may(by, 'data.read')
		? facts
		: { ...facts, turns: [], tallies: [], sortings: [], errors: [] };
	return stripCells(shown, animal.status === 'ended' ? null : clock.today);
}

export async function create(
	by: Actor | null,
	input: NewAnimalInput,
	marks: AnimalMarks = {}
): Promise<{ id: string; code: string }> {
	demand(by, 'animals.write');
	const animal = parsed(newAnimalSchema, input);
	const day = await today();
	const { id, code } = await record(by, (w) => insertAnimal(w, animal, day, marks));
	return { id, code };
}

/** What a pasted list would add, with everything that is wrong in it; nothing is saved. */
export async function previewPaste(by: Actor | null, text: string): Promise<PastedAnimals> {
	demand(by, 'animals.write');
	return checkPaste(readPastedAnimals(text), await today());
}

/** Adds every animal of a pasted list, or none. @throws Invalid naming the first fault */
export async function paste(by: Actor | null, text: string): Promise<{ codes: string[] }> {
	demand(by, 'animals.write');
	const { rows, refusal } = await previewPaste(by, text);
	if (refusal) throw new Invalid([{ field: 'text', message: refusal }]);
	const issues = rows.flatMap(({ line, issues }) =>
		issues.map(({ message }) => ({ field: 'text', message: `Line ${line}: ${message}` }))
	);
	if (issues.length > 0) throw new Invalid(issues);
	const day = await today();
	return record(by, async (w) => {
		const codes: string[] = [];
		for (const { animal } of rows) {
			if (animal) codes.push((await insertAnimal(w, animal, day)).code);
		}
		return { codes };
	});
}

/** @throws Conflict `stale` when the animal was changed since the form was opened */
export async function edit(
	by: Actor | null,
	code: string,
	input: AnimalFactsInput
): Promise<{ code: string }> {
	demand(by, 'animals.write');
	const { revision, ...facts } = parsed(animalFactsSchema, input);
	return record(by, async (w) => {
		const animal = await animalOfCode(code, w.t);
		const before = { ...animal.get({ plain: true }) };
		const [changed] = await Animal.update(
			{ ...facts, revision: revision + 1 },
			{ where: { id: animal.id, revision }, transaction: w.t }
		);
		if (changed === 0) throw new Stale('animal');
		const names = Object.keys(facts) as (keyof typeof facts)[];
		const was = names
			.filter((name) => before[name] !== facts[name])
			.map((name) => [name, before[name]]);
		await w.log('animal.edit', { kind: 'animal', id: animal.id }, { was: Object.fromEntries(was) });
		return { code: facts.code };
	});
}

/** Takes out an animal entered by mistake; its code stays used. One that died is ended instead. */
export async function withdraw(by: Actor | null, code: string, why: string): Promise<void> {
	demand(by, 'animals.write');
	const reason = parsed(withdrawalSchema, { why });
	await record(by, async (w) => {
		const animal = await animalOfCode(code, w.t);
		await animal.update(
			{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: reason.why },
			{ transaction: w.t }
		);
		await w.log('animal.withdraw', { kind: 'animal', id: animal.id }, reason);
	});
}

export async function restore(by: Actor | null, code: string): Promise<void> {
	demand(by, 'animals.write');
	await record(by, async (w) => {
		const animal = await Animal.findOne({
			where: {
				withdrawnAt: { [Op.not]: null },
				[Op.and]: where(fn('upper', col('code')), code.toUpperCase())
			},
			transaction: w.t
		});
		if (!animal) throw new NotFound();
		await animal.update(
			{ withdrawnAt: null, withdrawnBy: null, withdrawnWhy: null },
			{ transaction: w.t }
		);
		await w.log('animal.restore', { kind: 'animal', id: animal.id });
	});
}
