import type { CreationAttributes } from 'sequelize';
import { db } from '$lib/server/db';
import { Animal } from '$lib/server/models/animal';
import { nextNumber } from './sequence';

/** A rat in the lab, 400 g before restriction. */
export async function makeAnimal(
	fields: Partial<CreationAttributes<Animal>> = {}
): Promise<Animal> {
	db();
	return Animal.create({
		code: `R${String(nextNumber()).padStart(3, '0')}`,
		species: 'rat',
		sex: 'male',
		baselineWeightG: 400,
		...fields
	});
}
