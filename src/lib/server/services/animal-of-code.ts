import { col, fn, Op, where, type Transaction } from 'sequelize';
import { NotFound } from '$lib/server/errors';
import { Animal } from '$lib/server/models/animal';

/** The animal of a code, however its letters are written. @throws NotFound */
export async function animalOfCode(code: string, transaction?: Transaction): Promise<Animal> {
	const animal = await Animal.findOne({
		where: {
			withdrawnAt: null,
			[Op.and]: where(fn('upper', col('code')), code.trim().toUpperCase())
		},
		transaction
	});
	if (!animal) throw new NotFound(`There is no animal ${code.trim()}, or it is not yours to see.`);
	return animal;
}
