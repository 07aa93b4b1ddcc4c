import { passwordPairSchema } from '$lib/schemas/people';
import { systemActor } from '$lib/server/access';
import { hashPassword } from '$lib/server/auth/password';
import { forgive, takeTry } from '$lib/server/auth/rate-limits';
import { hashSecret, newSecret } from '$lib/server/auth/secret';
import { steadily } from '$lib/server/auth/steady';
import { now } from '$lib/server/clock';
import { Gone, NotFound } from '$lib/server/errors';
import { resetLetter } from '$lib/server/mail/letters';
import { linkTo } from '$lib/server/mail/links';
import { PasswordReset } from '$lib/server/models/password-reset';
import { Person } from '$lib/server/models/person';
import { parsed } from '$lib/server/parsed';
import { record, type Write } from '$lib/server/record';
import { newcomer } from './invitations';
import * as labSettings from './lab-settings';
import * as outbox from './outbox';
import { refuseOwnAddress, tellChanged } from './passwords';
import * as signIns from './sign-ins';

const HOUR_MS = 60 * 60 * 1000;
/** Longer than the work takes when there is somebody to write to. */
const ANSWER_MS = 500;

/**
 * Mails a one-time address when `email` is an active person's. The caller learns nothing either
 * way: same answer, same time, and a limit that counts unknown addresses too.
 */
export async function request(email: string, from: signIns.Origin): Promise<void> {
	await takeTry('reset-address', from.address);
	await takeTry('reset-account', email);
	await steadily(ANSWER_MS, async () => {
		const person = await Person.findOne({ where: { email, deactivatedAt: null } });
		if (!person) return;
		await record(systemActor(), async (w) => {
			const secret = await makeSecret(w, person.id, HOUR_MS);
			const { name: labName } = await labSettings.get('lab');
			await outbox.put(w, {
				dedupeKey: `reset:${hashSecret(secret)}`,
				kind: 'reset',
				to: person.email,
				toPersonId: person.id,
				...resetLetter({ labName, name: person.name, link: linkTo('reset', secret) })
			});
			await w.log('person.reset-asked', { kind: 'person', id: person.id });
		});
	});
}

/** A one-time way to set a password, as part of a write. */
export async function makeSecret(w: Write, personId: string, lastsMs: number): Promise<string> {
	const secret = newSecret();
	await PasswordReset.create(
		{
			personId,
			tokenHash: hashSecret(secret),
			createdAt: now(),
			expiresAt: new Date(now().getTime() + lastsMs)
		},
		{ transaction: w.t }
	);
	return secret;
}

/** Whose password the mailed address sets. @throws NotFound, Gone, TooMany */
export async function find(
	secret: string,
	from: signIns.Origin
): Promise<{ name: string; email: string }> {
	const reset = await PasswordReset.findOne({ where: { tokenHash: hashSecret(secret) } });
	if (!reset) {
		await takeTry('link-address', from.address);
		throw unknown();
	}
	refuseUnusable(reset);
	const person = await Person.findOne({ where: { id: reset.personId, deactivatedAt: null } });
	if (!person) throw unknown();
	return { name: person.name, email: person.email };
}

/** Sets the password once; every browser signed in before is signed out. */
export async function complete(
	secret: string,
	input: { password: string; passwordAgain: string },
	from: signIns.Origin
): Promise<void> {
	const { name, email } = await find(secret, from);
	const { password } = parsed(passwordPairSchema, input);
	refuseOwnAddress(password, email);
	const passwordHash = await hashPassword(password);
	const tokenHash = hashSecret(secret);
	const found = await PasswordReset.findOne({ where: { tokenHash } });
	if (!found) throw unknown();
	const { personId } = found;
	await record(newcomer(personId, name), async (w) => {
		const reset = await PasswordReset.findOne({
			where: { tokenHash },
			transaction: w.t,
			lock: true
		});
		const person = await Person.findOne({
			where: { id: personId, deactivatedAt: null },
			transaction: w.t
		});
		if (!reset || !person) throw unknown();
		refuseUnusable(reset);
		await spendAll(w, personId);
		await person.update({ passwordHash }, { transaction: w.t });
		const ended = await signIns.endAll(w, personId, null);
		await tellChanged(w, person);
		await w.log('person.password-reset', { kind: 'person', id: personId }, { ended });
	});
	await forgive('sign-in-account', email);
}

/** Every open reset of a person ends, as part of a write. */
export async function spendAll(w: Write, personId: string): Promise<void> {
	await PasswordReset.update(
		{ usedAt: now() },
		{ where: { personId, usedAt: null }, transaction: w.t }
	);
}

function refuseUnusable(reset: PasswordReset): void {
	if (reset.usedAt) {
		throw new Gone(
			'reset-used',
			'This address was used already. Your password is as it was set then; ask for a new address if you need one.'
		);
	}
	if (reset.expiresAt <= now()) {
		throw new Gone(
			'reset-expired',
			'This address has expired; your password is unchanged. Ask for a new one.'
		);
	}
}

function unknown(): NotFound {
	return new NotFound(
		'This address opens nothing. Perhaps it was cut off in the mail; you can ask for a new one.'
	);
}
