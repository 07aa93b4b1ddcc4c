import type { Role } from '$lib/schemas/roles';
import type { Actor } from '$lib/server/access';
import { Conflict, Forbidden } from '$lib/server/errors';
import { RoleGrant } from '$lib/server/models/role-grant';
import type { Write } from '$lib/server/record';

/** A PI, or the lab's own machine, which could change anything anyway. */
export function isPi(by: Actor): boolean {
	return by.roles.has('pi') || by.via === 'command' || by.via === 'system';
}

/**
 * The role PI is given and taken by PIs alone, and nobody else changes their own roles:
 * an admin runs the installation without thereby reading or writing the science.
 */
export function refuseRoleChange(by: Actor, personId: string | null, roles: readonly Role[]): void {
	if (isPi(by)) return;
	if (roles.includes('pi')) throw new Forbidden('Only a PI gives or takes the role PI.');
	if (personId !== null && personId === by.personId) {
		throw new Forbidden('Nobody but a PI changes their own roles. Ask a PI.');
	}
}

/** The lab always keeps one PI who can sign in. Call it before taking the role or the person away. */
export async function keepOnePi(w: Write, personId: string): Promise<void> {
	const pis = await RoleGrant.holdPis(w.t);
	if (pis.includes(personId) && pis.length === 1) {
		throw new Conflict(
			'last-pi',
			'This is the lab’s last PI. Nothing was changed: make somebody else PI first.'
		);
	}
}
