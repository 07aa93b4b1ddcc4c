import { isOwnAddress } from '$lib/schemas/password';
import { passwordChangeSchema, type PasswordChange } from '$lib/schemas/people';
import { demand, personOf, type Actor } from '$lib/server/access';
import { hashPassword, isPassword } from '$lib/server/auth/password';
import { forgive, takeTry } from '$lib/server/auth/rate-limits';
import { Invalid, NotFound } from '$lib/server/errors';
import { passwordChangedLetter } from '$lib/server/mail/letters';
import { Person } from '$lib/server/models/person';
import { parsed } from '$lib/server/parsed';
import { record, type Write } from '$lib/server/record';
import * as labSettings from './lab-settings';
import * as outbox from './outbox';
import * as signIns from './sign-ins';

/** @throws Invalid when the password is the person's own mail address */
export function refuseOwnAddress(password: string, email: string): void {
	if (isOwnAddress(password, email)) {
		throw new Invalid([
			{ field: 'password', message: 'This is your mail address. Choose another password.' }
		]);
	}
}

/** Changes the reader's own password; their other browsers are signed out. */
export async function change(
	by: Actor | null,
	input: PasswordChange & { passwordAgain: string },
	sessionId: string | null
): Promise<void> {
	demand(by, 'own.write');
	const { currentPassword, password } = parsed(passwordChangeSchema, input);
	const personId = personOf(by);
	await takeTry('password-account', personId);
	const person = await Person.findByPk(personId);
	if (!person) throw new NotFound();
	if (!(await isPassword(person.passwordHash, currentPassword))) {
		throw new Invalid([{ field: 'currentPassword', message: 'This is not your password.' }]);
	}
	await forgive('password-account', personId);
	refuseOwnAddress(password, person.email);
	const passwordHash = await hashPassword(password);
	await record(by, async (w) => {
		await person.update({ passwordHash }, { transaction: w.t });
		const ended = await signIns.endAll(w, personId, sessionId);
		await tellChanged(w, person);
		await w.log('person.password-changed', { kind: 'person', id: personId }, { ended });
	});
}

/** A mail to the account's owner, so that a change they did not make does not stay unseen. */
export async function tellChanged(w: Write, person: Person): Promise<void> {
	const { name: labName } = await labSettings.get('lab');
	await outbox.put(w, {
		dedupeKey: `password-changed:${person.id}:${person.passwordHash?.slice(-16)}`,
		kind: 'password-changed',
		to: person.email,
		toPersonId: person.id,
		...passwordChangedLetter({ labName, name: person.name })
	});
}
