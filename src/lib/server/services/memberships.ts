import { joinSchema, type JoinInput } from '$lib/schemas/animal';
import { demand, type Actor } from '$lib/server/access';
import { Conflict, Invalid, NotFound } from '$lib/server/errors';
import { AnimalProject } from '$lib/server/models/animal-project';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import { Project } from '$lib/server/models/project';
import { parsed } from '$lib/server/parsed';
import { record } from '$lib/server/record';
import { animalOfCode } from './animal-of-code';
import { today } from './lab-clock';
import { holdProtocol, takePlace } from './protocol-places';

/** @throws Conflict `protocol-expired`, `protocol-full`, `protocol-overlap` */
export async function joinProtocol(by: Actor | null, code: string, input: JoinInput) {
	demand(by, 'animals.write');
	const { id, from, until } = parsed(joinSchema, input);
	const day = await today();
	await record(by, async (w) => {
		const animal = await animalOfCode(code, w.t);
		const protocol = await holdProtocol({ id }, w.t);
		const stay = { from: from ?? day, until };
		await takePlace(protocol, animal.id, stay, day, w.t);
		const detail = { protocol: protocol.number, ...stay };
		await w.log('animal.join-protocol', { kind: 'animal', id: animal.id }, detail);
	});
}

export async function joinProject(by: Actor | null, code: string, input: JoinInput) {
	demand(by, 'animals.write');
	const { id, from, until } = parsed(joinSchema, input);
	const day = await today();
	await record(by, async (w) => {
		const animal = await animalOfCode(code, w.t);
		const project = await Project.findOne({ where: { id, withdrawnAt: null }, transaction: w.t });
		if (!project) throw new Invalid([{ field: 'id', message: 'There is no such project in use.' }]);
		const stay = { fromDay: from ?? day, untilDay: until };
		await AnimalProject.create(
			{ animalId: animal.id, projectId: id, ...stay },
			{ transaction: w.t }
		);
		const detail = { project: project.name, from: stay.fromDay, until };
		await w.log('animal.join-project', { kind: 'animal', id: animal.id }, detail);
	});
}

/** Ends a membership; `until` is the first day on which it no longer holds, today by default. */
export async function leave(
	by: Actor | null,
	code: string,
	kind: 'protocol' | 'project',
	membershipId: string,
	until?: string
) {
	demand(by, 'animals.write');
	const untilDay = until ?? (await today());
	await record(by, async (w) => {
		const animal = await animalOfCode(code, w.t);
		const where = { id: membershipId, animalId: animal.id };
		const membership =
			kind === 'protocol'
				? await AnimalProtocol.findOne({ where, transaction: w.t })
				: await AnimalProject.findOne({ where, transaction: w.t });
		if (!membership) throw new NotFound();
		if (membership.untilDay)
			throw new Conflict('already-left', 'This membership has an end already.');
		if (untilDay < membership.fromDay) {
			throw new Conflict('not-begun', `This membership begins on ${membership.fromDay}.`);
		}
		membership.untilDay = untilDay;
		await membership.save({ transaction: w.t });
		const detail = { membershipId, until: untilDay };
		await w.log(`animal.leave-${kind}`, { kind: 'animal', id: animal.id }, detail);
	});
}
