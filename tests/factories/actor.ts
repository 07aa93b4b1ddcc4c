import type { Role } from '$lib/schemas/roles';
import type { Actor } from '$lib/server/access';
import type { Person } from '$lib/server/models/person';
import { makePerson } from './person';

/** `person` as they act through a page, unless `fields` says otherwise. */
export function actorOf(
	person: Person,
	roles: readonly Role[],
	fields: Partial<Actor> = {}
): Actor {
	return {
		personId: person.id,
		name: person.name,
		roles: new Set(roles),
		isBlinded: person.isBlinded ?? false,
		via: 'page',
		scope: 'write',
		...fields
	};
}

/** A new person of these roles, ready to call services with. */
export async function makeActor(...roles: Role[]): Promise<Actor & { personId: string }> {
	const person = await makePerson({ roles });
	return { ...actorOf(person, roles), personId: person.id };
}
