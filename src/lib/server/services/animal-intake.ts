import { col, fn, Op, where } from 'sequelize';
import type { NewAnimal } from '$lib/schemas/animal';
import { Invalid } from '$lib/server/errors';
import { Animal } from '$lib/server/models/animal';
import { AnimalProject } from '$lib/server/models/animal-project';
import { Project } from '$lib/server/models/project';
import type { Write } from '$lib/server/record';
import { holdProtocol, takePlace } from './protocol-places';

/** What only the demo lab and imports set. */
export interface AnimalMarks {
	isSimulated?: boolean;
}

/** Adds one animal with the memberships it begins with. */
export async function insertAnimal(
	w: Write,
	{ protocol, project, memberSince, revision: _, ...facts }: NewAnimal,
	today: string,
	marks: AnimalMarks = {}
): Promise<Animal> {
	const animal = await Animal.create({ ...facts, ...marks }, { transaction: w.t });
	const from = memberSince ?? today;
	if (protocol) {
		const held = await holdProtocol({ number: protocol }, w.t);
		await takePlace(held, animal.id, { from, until: null }, today, w.t);
	}
	if (project) {
		const joined = await projectNamed(w, project);
		await AnimalProject.create(
			{ animalId: animal.id, projectId: joined.id, fromDay: from },
			{ transaction: w.t }
		);
	}
	const detail = { code: animal.code, ...(protocol && { protocol }), ...(project && { project }) };
	await w.log('animal.create', { kind: 'animal', id: animal.id }, detail);
	return animal;
}

async function projectNamed({ t: transaction }: Write, name: string): Promise<Project> {
	const project = await Project.findOne({
		where: { withdrawnAt: null, [Op.and]: where(fn('lower', col('name')), name.toLowerCase()) },
		transaction
	});
	if (project) return project;
	const message = `There is no project “${name}” in use. Choose one from the Lab page.`;
	throw new Invalid([{ field: 'project', message }]);
}

/** Codes of the list that animals have already, in capitals. */
export async function takenCodes(codes: string[]): Promise<Set<string>> {
	const capitals = codes.map((code) => code.toUpperCase());
	const rows = await Animal.findAll({
		attributes: ['code'],
		where: where(fn('upper', col('code')), { [Op.in]: capitals })
	});
	return new Set(rows.map((row) => row.code.toUpperCase()));
}
