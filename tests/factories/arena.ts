import type { CreationAttributes } from 'sequelize';
import { db } from '$lib/server/db';
import { Arena } from '$lib/server/models/arena';
import { nextNumber } from './sequence';

/** A straight track of 300 cm. */
export async function makeArena(fields: Partial<CreationAttributes<Arena>> = {}): Promise<Arena> {
	db();
	return Arena.create({
		name: `Arena ${nextNumber()}`,
		description: 'straight:300',
		...fields
	});
}
