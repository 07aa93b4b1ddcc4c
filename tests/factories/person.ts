import { hash } from '@node-rs/argon2';
import type { CreationAttributes } from 'sequelize';
import type { Role } from '$lib/schemas/roles';
import { Person } from '$lib/server/models/person';
import { RoleGrant } from '$lib/server/models/role-grant';
import { db } from '$lib/server/db';
import { nextNumber } from './sequence';

/** A person with roles; give `password` when the test signs in (a cheap hash, verified like any). */
export async function makePerson({
	roles = ['experimenter'],
	password,
	...fields
}: Partial<CreationAttributes<Person>> & {
	roles?: readonly Role[];
	password?: string;
} = {}): Promise<Person> {
	db();
	const n = nextNumber();
	const person = await Person.create({
		email: `person${n}@example.org`,
		name: `Person ${n}`,
		passwordHash: password
			? await hash(password, { memoryCost: 1024, timeCost: 1, parallelism: 1 })
			: null,
		...fields
	});
	await RoleGrant.bulkCreate(roles.map((role) => ({ personId: person.id, role })));
	return person;
}
