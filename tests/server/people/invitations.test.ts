import { describe, expect, it } from 'vitest';
import { setClock } from '$lib/server/clock';
import { Conflict, Forbidden, Invalid, NotFound } from '$lib/server/errors';
import { Invitation } from '$lib/server/models/invitation';
import { Person } from '$lib/server/models/person';
import * as invitations from '$lib/server/services/invitations';
import * as signIns from '$lib/server/services/sign-ins';
import type { Role } from '$lib/schemas/roles';
import { makeActor } from '../../factories/actor';
import { makePerson } from '../../factories/person';
import { nextNumber } from '../../factories/sequence';
import { newestMail } from './mailbox';
import { refusalOf } from './refusal';

const from = () => ({ address: `10.1.0.${nextNumber()}`, userAgent: 'test' });
const choice = {
	name: 'Nina New',
	password: 'a few slow turns',
	passwordAgain: 'a few slow turns'
};

async function invited(roles: Role[] = ['experimenter']) {
	const pi = await makeActor('pi');
	const email = `new${nextNumber()}@lab.example`;
	const id = await invitations.invite(pi, { email, name: 'Nina New', roles });
	return { pi, email, id, secret: (await newestMail(email)).secret };
}

describe('an invitation', () => {
	it('makes a person of the roles offered, who is signed in and can sign in again', async () => {
		const { email, secret } = await invited(['experimenter', 'surgeon']);
		const cookie = await invitations.accept(secret, choice, from());
		const { actor } = await signIns.read(cookie.value);
		expect([...(actor?.roles ?? [])].sort()).toEqual(['experimenter', 'surgeon']);
		await expect(
			signIns.signIn({ email, password: choice.password }, from())
		).resolves.toBeTruthy();
	});

	it('keeps its password as argon2id of OWASP’s cost', async () => {
		const { email, secret } = await invited();
		await invitations.accept(secret, choice, from());
		const person = await Person.findOne({ where: { email } });
		expect(person?.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
	});

	it('works once', async () => {
		const { secret } = await invited();
		await invitations.accept(secret, choice, from());
		const again = await refusalOf(invitations.accept(secret, choice, from()));
		expect(again.code).toBe('invitation-used');
	});

	it('makes one person when it is accepted twice at once', async () => {
		const { email, secret } = await invited();
		const both = await Promise.allSettled([
			invitations.accept(secret, choice, from()),
			invitations.accept(secret, choice, from())
		]);
		expect(both.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
		expect(await Person.count({ where: { email } })).toBe(1);
	});

	it('opens nothing once withdrawn, expired or sent again', async () => {
		const withdrawn = await invited();
		await invitations.withdraw(withdrawn.pi, withdrawn.id);
		const one = await refusalOf(invitations.find(withdrawn.secret, from()));
		expect(one.code).toBe('invitation-withdrawn');

		const expired = await invited();
		const back = setClock(() => new Date(Date.now() + 15 * 86_400_000));
		const two = await refusalOf(invitations.accept(expired.secret, choice, from()));
		back();
		expect(two.code).toBe('invitation-expired');

		const resent = await invited();
		await invitations.resend(resent.pi, resent.id);
		await expect(invitations.find(resent.secret, from())).rejects.toThrow(NotFound);
		const { secret } = await newestMail(resent.email);
		await expect(invitations.find(secret, from())).resolves.toMatchObject({ email: resent.email });
	});

	it('is refused for a secret that was never sent, and after many of those the address waits', async () => {
		const guesser = from();
		const first = await refusalOf(invitations.find('x'.repeat(43), guesser));
		expect(first).toBeInstanceOf(NotFound);
		for (let i = 0; i < 59; i += 1) await refusalOf(invitations.find(`guess${i}`, guesser));
		const last = await refusalOf(invitations.find('one more', guesser));
		expect(last.code).toBe('too-many-tries');
	}, 60_000);

	it.each([
		['too short', 'short'],
		['a common one', 'password1234'],
		['the address itself', null]
	])('refuses a password that is %s, and stays open', async (_, given) => {
		const { email, secret } = await invited();
		const password = given ?? email;
		const refusal = await refusalOf(
			invitations.accept(secret, { name: 'N', password, passwordAgain: password }, from())
		);
		expect(refusal).toBeInstanceOf(Invalid);
		expect(refusal).toMatchObject({ issues: [{ field: 'password' }] });
		await expect(invitations.find(secret, from())).resolves.toBeTruthy();
	});

	it('is not kept readable: the table holds a hash', async () => {
		const { id, secret } = await invited();
		const row = await Invitation.findByPk(id);
		expect(JSON.stringify(row)).not.toContain(secret);
	});

	it('goes once to an address, and to no member', async () => {
		const { pi, email } = await invited();
		const input = { email, name: 'Nina', roles: ['observer' as const] };
		const twice = await refusalOf(invitations.invite(pi, input));
		expect(twice.code).toBe('already-invited');
		const member = await makePerson();
		const known = await refusalOf(invitations.invite(pi, { ...input, email: member.email }));
		expect(known).toBeInstanceOf(Conflict);
		expect(known.code).toBe('email-taken');
	});

	it('to be PI comes from a PI only', async () => {
		const admin = await makeActor('admin');
		const input = { email: `x${nextNumber()}@lab.example`, name: 'X', roles: ['pi' as const] };
		await expect(invitations.invite(admin, input)).rejects.toThrow(/Only a PI/);
		const { id } = await invited(['pi']);
		await expect(invitations.resend(admin, id)).rejects.toThrow(Forbidden);
	});

	it.each(['observer', 'experimenter', 'surgeon', 'welfare'] as const)(
		'is not made, seen or withdrawn by a %s',
		async (role) => {
			const by = await makeActor(role);
			const input = { email: 'y@lab.example', name: 'Y', roles: ['observer' as const] };
			await expect(invitations.invite(by, input)).rejects.toThrow(Forbidden);
			await expect(invitations.list(by)).rejects.toThrow(Forbidden);
			const { id } = await invited();
			await expect(invitations.withdraw(by, id)).rejects.toThrow(Forbidden);
		}
	);
});
