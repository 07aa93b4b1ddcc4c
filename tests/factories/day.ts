import type { CreationAttributes } from 'sequelize';
import { Day } from '$lib/server/models/day';
import { makeAnimal } from './animal';

export async function makeDay(fields: Partial<CreationAttributes<Day>> = {}): Promise<Day> {
	return Day.create({
		animalId: fields.animalId ?? (await makeAnimal()).id,
		date: '2026-03-02',
		...fields
	});
}
