import { v7 as uuidv7 } from 'uuid';
import type { Cookie } from 'lucia';
import { firstSchema, type First } from '$lib/schemas/people';
import { demand, systemActor } from '$lib/server/access';
import { hashPassword } from '$lib/server/auth/password';
import { takeTry } from '$lib/server/auth/rate-limits';
import { hashSecret, newSecret } from '$lib/server/auth/secret';
import { now } from '$lib/server/clock';
import { Gone, NotFound } from '$lib/server/errors';
import { linkTo } from '$lib/server/mail/links';
import { FIRST_PI, Invitation } from '$lib/server/models/invitation';
import { Person } from '$lib/server/models/person';
import { parsed } from '$lib/server/parsed';
import { record } from '$lib/server/record';
import { giveRoles, newcomer } from './invitations';
import * as labSettings from './lab-settings';
import { refuseOwnAddress } from './passwords';
import * as signIns from './sign-ins';

const WEEK_MS = 7 * 24 * 60 * 60 * 1000;

/**
 * The one-time address at which the first PI of an empty lab is made, or null once the lab has
 * people. Each call makes a new one and ends the one before: only a hash is kept, so an address
 * that was lost with the terminal's output could not be shown again.
 */
export async function address(origin?: string): Promise<string | null> {
	const by = systemActor('command');
	demand(by, 'members.write');
	if ((await Person.count()) > 0) return null;
	await labSettings.prepare(by);
	const secret = newSecret();
	const fresh = { tokenHash: hashSecret(secret), expiresAt: new Date(now().getTime() + WEEK_MS) };
	await record(by, async (w) => {
		const open = await Invitation.findOne({
			where: { email: FIRST_PI, acceptedAt: null, withdrawnAt: null },
			transaction: w.t,
			lock: true
		});
		const { id } = open
			? await open.update(fresh, { transaction: w.t })
			: await Invitation.create(
					{ ...fresh, email: FIRST_PI, name: 'First PI', roles: ['pi', 'admin'] },
					{ transaction: w.t }
				);
		await w.log('lab.first-address-made', { kind: 'invitation', id });
	});
	return linkTo('first', secret, origin);
}

/** @throws NotFound, TooMany; Gone once used or past its week */
export async function check(secret: string, from: signIns.Origin): Promise<void> {
	const found = await Invitation.findOne({
		where: { tokenHash: hashSecret(secret), email: FIRST_PI }
	});
	if (!found) {
		await takeTry('link-address', from.address);
		throw new NotFound(
			'This address opens nothing. The server prints a new one at each start while the lab is empty.'
		);
	}
	refuseUnusable(found);
}

/** Makes the first PI, names the lab, fixes its zone, and signs the person in. */
export async function accept(
	secret: string,
	input: First & { passwordAgain: string },
	from: signIns.Origin
): Promise<Cookie> {
	await check(secret, from);
	const first = parsed(firstSchema, input);
	const { name, email, password, labName, timeZone } = first;
	refuseOwnAddress(password, email);
	const passwordHash = await hashPassword(password);
	const id = uuidv7();
	const by = newcomer(id, name);
	await record(by, async (w) => {
		const invitation = await Invitation.findOne({
			where: { tokenHash: hashSecret(secret), email: FIRST_PI },
			transaction: w.t,
			lock: true
		});
		if (!invitation) throw new NotFound();
		refuseUnusable(invitation);
		if ((await Person.count({ transaction: w.t })) > 0) throw used();
		await Person.create({ id, email, name, passwordHash }, { transaction: w.t });
		await giveRoles(w, id, invitation.roles, null);
		await invitation.update({ acceptedAt: now(), acceptedBy: id }, { transaction: w.t });
		const before = await labSettings.get('lab');
		await labSettings.put(w, by, 'lab', { ...before, name: labName, timeZone });
		await w.log('lab.first-person-made', { kind: 'person', id });
	});
	return signIns.start({ id, name }, from);
}

function refuseUnusable(invitation: Invitation): void {
	if (invitation.acceptedAt) throw used();
	if (invitation.expiresAt <= now()) {
		throw new Gone(
			'first-expired',
			'This address has expired. Start the server again: it prints a new one.'
		);
	}
}

function used(): Gone {
	return new Gone('first-used', 'The first person was made already. Sign in instead.');
}
