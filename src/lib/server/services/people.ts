import { z } from 'zod';
import { initials } from '$lib/format/initials';
import { mailAddressSchema } from '$lib/schemas/mail-address';
import { personNameSchema, profileSchema, type ProfileChange } from '$lib/schemas/people';
import { ROLES, roleSchema, type Role } from '$lib/schemas/roles';
import { demand, personOf, systemActor, type Actor } from '$lib/server/access';
import { Conflict, NotFound } from '$lib/server/errors';
import { welcomeLetter } from '$lib/server/mail/letters';
import { linkTo } from '$lib/server/mail/links';
import { Person } from '$lib/server/models/person';
import { parsed } from '$lib/server/parsed';
import { record } from '$lib/server/record';
import * as firstPerson from './first-person';
import { giveRoles } from './invitations';
import * as labSettings from './lab-settings';
import * as outbox from './outbox';
import * as resets from './resets';

export interface Self {
	id: string;
	name: string;
	initials: string;
	roles: Role[];
}

export interface Profile extends Self {
	email: string;
	/** Null: the lab's zone. */
	timeZone: string | null;
	revision: number;
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

export async function profile(by: Actor | null): Promise<Profile> {
	demand(by, 'own.read');
	const person = await Person.findByPk(personOf(by));
	if (!person) throw new NotFound();
	const { email, timeZone, revision } = person;
	return { ...(await self(by)), email, timeZone, revision };
}

export async function editProfile(by: Actor | null, input: ProfileChange): Promise<void> {
	demand(by, 'own.write');
	const { name, timeZone, revision } = parsed(profileSchema, input);
	const id = personOf(by);
	await record(by, async (w) => {
		const [changed] = await Person.update(
			{ name, timeZone: timeZone || null, revision: revision + 1 },
			{ where: { id, revision }, transaction: w.t }
		);
		if (changed === 0) {
			throw new Conflict(
				'stale',
				'Your profile was changed meanwhile, perhaps in another window. Nothing was overwritten: open the page again and enter your change once more.'
			);
		}
		await w.log('person.edited', { kind: 'person', id }, { name, timeZone });
	});
}

/** Active people to choose from: surgeons, named people of a protocol, deputies. */
export async function choices(by: Actor | null): Promise<{ id: string; name: string }[]> {
	demand(by, 'members.read');
	const people = await Person.findAll({
		attributes: ['id', 'name'],
		where: { deactivatedAt: null },
		order: [['name', 'ASC']]
	});
	return people.map(({ id, name }) => ({ id, name }));
}

/** For whoever starts the server: see `first-person`. */
export function firstAddress(origin?: string): Promise<string | null> {
	return firstPerson.address(origin);
}

const WELCOME_DAYS = 7;

const newPersonSchema = z.object({
	email: mailAddressSchema,
	name: personNameSchema,
	roles: z.array(roleSchema).min(1)
});

/**
 * For `lab person add`, run on the lab's own machine: the person exists at once, so a token can be
 * made for them, and chooses a password at the returned one-time address (also mailed).
 */
export async function addByCommand(
	input: z.input<typeof newPersonSchema>
): Promise<{ personId: string; address: string; days: number }> {
	const by = systemActor('command');
	demand(by, 'members.write');
	const { email, name, roles } = parsed(newPersonSchema, input);
	await labSettings.prepare(by);
	const { name: labName } = await labSettings.get('lab');
	return record(by, async (w) => {
		const { id } = await Person.create({ email, name }, { transaction: w.t });
		await giveRoles(w, id, [...new Set(roles)], null);
		const secret = await resets.makeSecret(w, id, WELCOME_DAYS * 24 * 60 * 60 * 1000);
		const address = linkTo('reset', secret);
		await outbox.put(w, {
			dedupeKey: `welcome:${id}`,
			kind: 'welcome',
			to: email,
			toPersonId: id,
			...welcomeLetter({ labName, name, link: address, days: WELCOME_DAYS })
		});
		await w.log('person.added', { kind: 'person', id }, { email, roles });
		return { personId: id, address, days: WELCOME_DAYS };
	});
}
