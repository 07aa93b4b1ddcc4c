import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, Invalid, NotFound } from '$lib/server/errors';
import { Animal } from '$lib/server/models/animal';
import { Deputy } from '$lib/server/models/deputy';
import { Person } from '$lib/server/models/person';
import { record } from '$lib/server/record';

export interface DeputyEntry {
	id: string;
	personId: string;
	personName: string;
	namedAt: Date;
}

/** Who may answer advice and set targets for the animal beside its PIs. */
export async function list(by: Actor | null, animalId: string): Promise<DeputyEntry[]> {
	demand(by, 'animals.read');
	return Deputy.ofAnimal(animalId);
}

export async function name(by: Actor | null, animalId: string, personId: string): Promise<void> {
	demand(by, 'deputies.write');
	const namedBy = personOf(by);
	if (personId === namedBy) {
		throw new Invalid([
			{ field: 'personId', message: 'A PI needs no deputy’s right. Name somebody else.' }
		]);
	}
	await record(by, async (w) => {
		const [animal, person] = await Promise.all([
			Animal.findByPk(animalId, { transaction: w.t }),
			Person.findOne({ where: { id: personId, deactivatedAt: null }, transaction: w.t })
		]);
		if (!animal || !person) throw new NotFound();
		const { id } = await Deputy.create({ animalId, personId, namedBy }, { transaction: w.t });
		await w.log('deputy.named', { kind: 'animal', id: animalId }, { deputyId: id, personId });
	});
}

export async function end(by: Actor | null, deputyId: string): Promise<void> {
	demand(by, 'deputies.write');
	await record(by, async (w) => {
		const deputy = await Deputy.findByPk(deputyId, { transaction: w.t, lock: true });
		if (!deputy) throw new NotFound();
		if (deputy.endedAt) throw new Conflict('ended', 'This person is not a deputy any more.');
		await deputy.update({ endedAt: now(), endedBy: by.personId }, { transaction: w.t });
		await w.log('deputy.ended', { kind: 'animal', id: deputy.animalId }, { deputyId });
	});
}

/** Whether the actor stands in for a PI on this animal. */
export async function isDeputy(by: Actor, animalId: string): Promise<boolean> {
	if (by.personId === null) return false;
	const count = await Deputy.count({
		where: { animalId, personId: by.personId, endedAt: null }
	});
	return count > 0;
}
