import type { CreationAttributes } from 'sequelize';
import { db } from '$lib/server/db';
import { Rig } from '$lib/server/models/rig';
import { nextNumber } from './sequence';

/** A rig. */
export async function makeRig(fields: Partial<CreationAttributes<Rig>> = {}): Promise<Rig> {
	db();
	return Rig.create({
		name: `Rig ${nextNumber()}`,
		...fields
	});
}
