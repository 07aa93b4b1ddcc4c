import { v7 as uuidv7 } from 'uuid';
import type { Cookie } from 'lucia';
import { acceptSchema, inviteSchema, type Accept, type Invite } from '$lib/schemas/people';
import type { Role } from '$lib/schemas/roles';
import { demand, type Actor } from '$lib/server/access';
import { hashPassword } from '$lib/server/auth/password';
import { takeTry } from '$lib/server/auth/rate-limits';
import { hashSecret, newSecret } from '$lib/server/auth/secret';
import { now } from '$lib/server/clock';
import { Conflict, Gone, NotFound } from '$lib/server/errors';
import { invitationLetter } from '$lib/server/mail/letters';
import { linkTo } from '$lib/server/mail/links';
import { FIRST_PI, Invitation } from '$lib/server/models/invitation';
import { Person } from '$lib/server/models/person';
import { RoleGrant } from '$lib/server/models/role-grant';
import { parsed } from '$lib/server/parsed';
import { record, type Write } from '$lib/server/record';
import * as labSettings from './lab-settings';
import * as outbox from './outbox';
import { refuseOwnAddress } from './passwords';
import { refuseRoleChange } from './role-rules';
import * as signIns from './sign-ins';

const DAYS = 14;

export interface OpenInvitation {
	id: string;
	email: string;
	name: string;
	roles: Role[];
	createdAt: Date;
	expiresAt: Date;
	hasExpired: boolean;
}

/** Those neither accepted nor withdrawn; an expired one can be sent again. */
export async function list(by: Actor | null): Promise<OpenInvitation[]> {
	demand(by, 'members.write');
	const rows = await Invitation.open();
	return rows.map(({ id, email, name, roles, createdAt, expiresAt }) => ({
		id,
		email,
		name,
		roles,
		createdAt,
		expiresAt,
		hasExpired: expiresAt <= now()
	}));
}

export async function invite(by: Actor | null, input: Invite): Promise<string> {
	demand(by, 'members.write');
	const { email, name, ...given } = parsed(inviteSchema, input);
	const roles = [...new Set(given.roles)];
	refuseRoleChange(by, null, roles);
	return record(by, async (w) => {
		if (await Person.findOne({ where: { email }, transaction: w.t })) {
			throw new Conflict(
				'email-taken',
				'Somebody with this mail address is a member already; a deactivated one can be let in again.'
			);
		}
		const secret = newSecret();
		const invitation = await Invitation.create(
			{
				email,
				name,
				roles,
				invitedBy: by.personId,
				tokenHash: hashSecret(secret),
				expiresAt: inDays()
			},
			{ transaction: w.t }
		);
		await post(w, by, invitation, secret);
		await w.log('invitation.made', subject(invitation), { email, roles });
		return invitation.id;
	});
}

/** A new address with new days to run; the one sent before opens nothing any more. */
export async function resend(by: Actor | null, id: string): Promise<void> {
	demand(by, 'members.write');
	await record(by, async (w) => {
		const invitation = await holdOpen(w, { id });
		refuseRoleChange(by, null, invitation.roles);
		const secret = newSecret();
		await invitation.update(
			{ tokenHash: hashSecret(secret), expiresAt: inDays() },
			{ transaction: w.t }
		);
		await post(w, by, invitation, secret);
		await w.log('invitation.resent', subject(invitation));
	});
}

export async function withdraw(by: Actor | null, id: string): Promise<void> {
	demand(by, 'members.write');
	await record(by, async (w) => {
		const invitation = await holdOpen(w, { id });
		refuseRoleChange(by, null, invitation.roles);
		await invitation.update({ withdrawnAt: now(), withdrawnBy: by.personId }, { transaction: w.t });
		await w.log('invitation.withdrawn', subject(invitation));
	});
}

/** What the page behind the mailed address shows. @throws NotFound, Gone, TooMany */
export async function find(
	secret: string,
	from: signIns.Origin
): Promise<{ email: string; name: string; roles: Role[] }> {
	const invitation = await Invitation.findOne({ where: { tokenHash: hashSecret(secret) } });
	if (!invitation || invitation.email === FIRST_PI) {
		await takeTry('link-address', from.address);
		throw unknown();
	}
	refuseClosed(invitation);
	refuseExpired(invitation);
	return { email: invitation.email, name: invitation.name, roles: invitation.roles };
}

/** Makes the person and signs them in. */
export async function accept(
	secret: string,
	input: Accept & { passwordAgain: string },
	from: signIns.Origin
): Promise<Cookie> {
	const { email } = await find(secret, from);
	const { name, password } = parsed(acceptSchema, input);
	refuseOwnAddress(password, email);
	const passwordHash = await hashPassword(password);
	const id = uuidv7();
	await record(newcomer(id, name), async (w) => {
		const invitation = await holdOpen(w, { tokenHash: hashSecret(secret) });
		refuseExpired(invitation);
		await Person.create({ id, email: invitation.email, name, passwordHash }, { transaction: w.t });
		await giveRoles(w, id, invitation.roles, invitation.invitedBy);
		await invitation.update({ acceptedAt: now(), acceptedBy: id }, { transaction: w.t });
		await w.log('invitation.accepted', subject(invitation), { roles: invitation.roles });
	});
	return signIns.start({ id, name }, from);
}

/** Somebody whose row this very write makes. */
export function newcomer(personId: string, name: string): Actor {
	return { personId, name, roles: new Set(), isBlinded: false, via: 'page', scope: 'write' };
}

export async function giveRoles(
	w: Write,
	personId: string,
	roles: readonly Role[],
	grantedBy: string | null
): Promise<void> {
	await RoleGrant.bulkCreate(
		roles.map((role) => ({ personId, role, grantedBy })),
		{ transaction: w.t }
	);
}

async function holdOpen(
	w: Write,
	where: { id: string } | { tokenHash: string }
): Promise<Invitation> {
	const invitation = await Invitation.findOne({ where, transaction: w.t, lock: true });
	if (!invitation || invitation.email === FIRST_PI) throw unknown();
	refuseClosed(invitation);
	return invitation;
}

function refuseClosed(invitation: Invitation): void {
	if (invitation.acceptedAt) {
		throw new Gone('invitation-used', 'This invitation was accepted already. Sign in instead.');
	}
	if (invitation.withdrawnAt) {
		throw new Gone(
			'invitation-withdrawn',
			'This invitation was withdrawn. Ask the person who invited you.'
		);
	}
}

function refuseExpired(invitation: Invitation): void {
	if (invitation.expiresAt > now()) return;
	throw new Gone(
		'invitation-expired',
		'This invitation has expired. Ask the person who invited you to send it again.'
	);
}

function unknown(): NotFound {
	return new NotFound(
		'This address opens no invitation. Perhaps a newer mail replaced it, or it was cut off in the mail.'
	);
}

async function post(w: Write, by: Actor, invitation: Invitation, secret: string): Promise<void> {
	const { name: labName } = await labSettings.get('lab');
	const { email, name, roles, tokenHash } = invitation;
	const link = linkTo('invitation', secret);
	await outbox.put(w, {
		dedupeKey: `invitation:${tokenHash}`,
		kind: 'invitation',
		to: email,
		...invitationLetter({ labName, name, roles, by: by.name, link, days: DAYS })
	});
}

function inDays(): Date {
	return new Date(now().getTime() + DAYS * 24 * 60 * 60 * 1000);
}

function subject({ id }: Invitation) {
	return { kind: 'invitation', id };
}
