import type { Role } from '$lib/schemas/roles';
import { systemActor, type Actor } from '$lib/server/access';
import { hashPassword } from '$lib/server/auth/password';
import { Person } from '$lib/server/models/person';
import { record } from '$lib/server/record';
import { giveRoles } from '$lib/server/services/invitations';
import { signIns } from './sign-ins';

/** The demo's people, each acting as themselves. */
export type Cast = Record<Role, Actor>;

/** Adds the people of the demo lab with their known passwords. */
export async function addPeople(): Promise<Cast> {
	const members = await Promise.all(signIns.map(addPerson));
	return Object.fromEntries(members) as Cast;
}

async function addPerson({ role, name, email, password }: (typeof signIns)[number]) {
	const passwordHash = await hashPassword(password);
	const { id } = await record(systemActor(), async (w) => {
		const person = await Person.create({ email, name, passwordHash }, { transaction: w.t });
		await giveRoles(w, person.id, [role], null);
		await w.log('person.added', { kind: 'person', id: person.id }, { email, roles: [role] });
		return person;
	});
	const actor: Actor = {
		personId: id,
		name,
		roles: new Set([role]),
		isBlinded: false,
		via: 'system',
		scope: 'write'
	};
	return [role, actor] as const;
}
