import type { CreationAttributes } from 'sequelize';
import { Weight } from '$lib/server/models/weight';
import { makeAnimal } from './animal';
import { makePerson } from './person';

export async function makeWeight(
	fields: Partial<CreationAttributes<Weight>> = {}
): Promise<Weight> {
	return Weight.create({
		animalId: fields.animalId ?? (await makeAnimal()).id,
		measuredBy: fields.measuredBy ?? (await makePerson()).id,
		measuredAt: new Date('2026-03-02T08:00:00Z'),
		grossG: 395,
		...fields
	});
}
