import { ROLES, type Role } from '$lib/schemas/roles';
import { initials } from '$lib/format/initials';
import { demand, may, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, Forbidden, NotFound } from '$lib/server/errors';
import { ApiToken } from '$lib/server/models/api-token';
import { Person } from '$lib/server/models/person';
import { RoleGrant } from '$lib/server/models/role-grant';
import { record, type Write } from '$lib/server/record';
import * as resets from './resets';
import { isPi, keepOnePi, refuseRoleChange } from './role-rules';
import * as signIns from './sign-ins';

export interface Member {
	id: string;
	name: string;
	initials: string;
	email: string;
	roles: Role[];
	createdAt: Date;
	deactivatedAt: Date | null;
	hasPassword: boolean;
	/** Null for readers who do not run the membership. */
	isBlinded: boolean | null;
}

/** Everybody who is or was a member. */
export async function list(by: Actor | null): Promise<Member[]> {
	demand(by, 'members.read');
	const runs = may(by, 'members.write');
	const people = await Person.withRoles();
	return people.map((person) => ({
		...person,
		initials: initials(person.name),
		roles: ROLES.filter((role) => person.roles.includes(role)),
		isBlinded: runs ? person.isBlinded : null
	}));
}

/**
 * Those who may be named as surgeon.
 * @param named stays in the list although that person may no longer be
 */
export async function surgeons(by: Actor | null, named?: string): Promise<Member[]> {
	const people = await list(by);
	const operates = ({ roles, deactivatedAt }: Member) =>
		!deactivatedAt && (roles.includes('surgeon') || roles.includes('pi'));
	return people.filter((person) => person.id === named || operates(person));
}

export async function grant(by: Actor | null, personId: string, role: Role): Promise<void> {
	demand(by, 'members.write');
	refuseRoleChange(by, personId, [role]);
	await record(by, async (w) => {
		await hold(w, personId);
		const has = await RoleGrant.findOne({
			where: { personId, role, revokedAt: null },
			transaction: w.t
		});
		if (has) throw new Conflict('role-held', 'This person has the role already.');
		await RoleGrant.create(
			{ personId, role, grantedAt: now(), grantedBy: by.personId },
			{ transaction: w.t }
		);
		await w.log('role.granted', subject(personId), { role });
	});
}

export async function revoke(by: Actor | null, personId: string, role: Role): Promise<void> {
	demand(by, 'members.write');
	refuseRoleChange(by, personId, [role]);
	await record(by, async (w) => {
		await hold(w, personId);
		if (role === 'pi') await keepOnePi(w, personId);
		const [ended] = await RoleGrant.update(
			{ revokedAt: now(), revokedBy: by.personId },
			{ where: { personId, role, revokedAt: null }, transaction: w.t }
		);
		if (ended === 0) throw new Conflict('role-not-held', 'This person does not have the role.');
		await w.log('role.revoked', subject(personId), { role });
	});
}

/** Blinded people see no sealed allocation. For PIs alone: they answer for the design of a study. */
export async function setBlinded(
	by: Actor | null,
	personId: string,
	isBlinded: boolean
): Promise<void> {
	demand(by, 'allocations.seal');
	await record(by, async (w) => {
		const person = await hold(w, personId);
		await person.update({ isBlinded }, { transaction: w.t });
		await w.log(isBlinded ? 'person.blinded' : 'person.unblinded', subject(personId));
	});
}

/** Ends a person's way in: sessions, tokens and open resets. What they wrote stays theirs. */
export async function deactivate(by: Actor | null, personId: string): Promise<void> {
	demand(by, 'members.write');
	await record(by, async (w) => {
		const person = await hold(w, personId);
		if (person.deactivatedAt) {
			throw new Conflict('deactivated', 'This person is deactivated already.');
		}
		await refuseTouchingPi(w, by, personId);
		await keepOnePi(w, personId);
		const at = now();
		await person.update({ deactivatedAt: at }, { transaction: w.t });
		const sessions = await signIns.endAll(w, personId, null);
		await resets.spendAll(w, personId);
		const [tokens] = await ApiToken.update(
			{ revokedAt: at, revokedBy: by.personId },
			{ where: { personId, revokedAt: null }, transaction: w.t }
		);
		await w.log('person.deactivated', subject(personId), { sessions, tokens });
	});
}

/** Lets a person in again with the roles they held; tokens revoked meanwhile stay revoked. */
export async function reactivate(by: Actor | null, personId: string): Promise<void> {
	demand(by, 'members.write');
	await record(by, async (w) => {
		const person = await hold(w, personId);
		if (!person.deactivatedAt) throw new Conflict('active', 'This person is active already.');
		await refuseTouchingPi(w, by, personId);
		await person.update({ deactivatedAt: null }, { transaction: w.t });
		await w.log('person.reactivated', subject(personId));
	});
}

async function refuseTouchingPi(w: Write, by: Actor, personId: string): Promise<void> {
	if (isPi(by)) return;
	const pi = await RoleGrant.findOne({
		where: { personId, role: 'pi', revokedAt: null },
		transaction: w.t
	});
	if (pi) throw new Forbidden('Only a PI deactivates a PI or lets one in again.');
}

async function hold(w: Write, personId: string): Promise<Person> {
	const person = await Person.findByPk(personId, { transaction: w.t, lock: true });
	if (!person) throw new NotFound();
	return person;
}

function subject(id: string) {
	return { kind: 'person', id };
}
