import { ROLES, type Role } from '$lib/schemas/roles';
import { demand, personOf, type Actor } from '$lib/server/access';
import { initials } from '$lib/format/initials';

export interface Self {
	id: string;
	name: string;
	initials: string;
	roles: Role[];
}

/** The reader, as every page shows them. */
export async function self(by: Actor | null): Promise<Self> {
	demand(by, 'own.read');
	return {
		id: personOf(by),
		name: by.name,
		initials: initials(by.name),
		roles: ROLES.filter((role) => by.roles.has(role))
	};
}
