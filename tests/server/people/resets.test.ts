import { describe, expect, it } from 'vitest';
import { setClock } from '$lib/server/clock';
import { Invalid, NotFound, TooMany } from '$lib/server/errors';
import { Outbox } from '$lib/server/models/outbox';
import * as members from '$lib/server/services/members';
import * as resets from '$lib/server/services/resets';
import * as signIns from '$lib/server/services/sign-ins';
import { makeActor } from '../../factories/actor';
import { makePerson } from '../../factories/person';
import { nextNumber } from '../../factories/sequence';
import { newestMail } from './mailbox';
import { refusalOf } from './refusal';

const OLD = 'the old password';
const from = () => ({ address: `10.2.0.${nextNumber()}`, userAgent: 'test' });
const pair = (password: string) => ({ password, passwordAgain: password });

async function asked() {
	const person = await makePerson({ password: OLD });
	await resets.request(person.email, from());
	return { person, secret: (await newestMail(person.email)).secret };
}

describe('a password reset', () => {
	it('sets the password, ends every session before it and says so by mail', async () => {
		const { person, secret } = await asked();
		const cookie = await signIns.signIn({ email: person.email, password: OLD }, from());
		await resets.complete(secret, pair('a brand new one'), from());
		expect((await signIns.read(cookie.value)).actor).toBeNull();
		const old = await refusalOf(signIns.signIn({ email: person.email, password: OLD }, from()));
		expect(old.code).toBe('wrong-sign-in');
		await signIns.signIn({ email: person.email, password: 'a brand new one' }, from());
		expect((await newestMail(person.email)).text).toMatch(/was changed/);
	});

	it('works once, and spends the other open ones of that person', async () => {
		const { person, secret } = await asked();
		await resets.request(person.email, from());
		const { secret: second } = await newestMail(person.email);
		await resets.complete(second, pair('a brand new one'), from());
		for (const spent of [secret, second]) {
			const refusal = await refusalOf(resets.complete(spent, pair('yet another one'), from()));
			expect(refusal.code).toBe('reset-used');
		}
	});

	it('sets one password when it is used twice at once', async () => {
		const { secret } = await asked();
		const both = await Promise.allSettled([
			resets.complete(secret, pair('the first of two'), from()),
			resets.complete(secret, pair('the second of two'), from())
		]);
		expect(both.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
	});

	it('ends after an hour', async () => {
		const { secret } = await asked();
		const back = setClock(() => new Date(Date.now() + 61 * 60_000));
		const refusal = await refusalOf(resets.find(secret, from()));
		back();
		expect(refusal.code).toBe('reset-expired');
	});

	it('answers an unknown or deactivated address alike, after the same time, and mails nobody', async () => {
		const gone = await makePerson({ password: OLD, deactivatedAt: new Date() });
		const known = await makePerson({ password: OLD });
		const times: number[] = [];
		for (const email of ['nobody-here@lab.example', gone.email, known.email]) {
			const before = performance.now();
			await expect(resets.request(email, from())).resolves.toBeUndefined();
			times.push(performance.now() - before);
		}
		for (const time of times) expect(time).toBeGreaterThanOrEqual(495);
		expect(await Outbox.count({ where: { toEmail: 'nobody-here@lab.example' } })).toBe(0);
		expect(await Outbox.count({ where: { toEmail: gone.email } })).toBe(0);
		expect(await Outbox.count({ where: { toEmail: known.email } })).toBe(1);
	});

	it('can be asked for three times an hour, whether or not there is such a member', async () => {
		for (const email of [(await makePerson()).email, 'nobody-knows@lab.example']) {
			for (let i = 0; i < 3; i += 1) await resets.request(email, from());
			const refusal = await refusalOf(resets.request(email, from()));
			expect(refusal).toBeInstanceOf(TooMany);
		}
	});

	it('ends when its person is deactivated', async () => {
		const { person, secret } = await asked();
		await members.deactivate(await makeActor('pi'), person.id);
		await refusalOf(resets.complete(secret, pair('a brand new one'), from()));
		await expect(resets.find('made up', from())).rejects.toThrow(NotFound);
	});

	it('refuses a weak password and a differing repetition', async () => {
		const { secret } = await asked();
		await expect(resets.complete(secret, pair('short'), from())).rejects.toThrow(Invalid);
		const differing = { password: 'a brand new one', passwordAgain: 'a brand new two' };
		const refusal = await refusalOf(resets.complete(secret, differing, from()));
		expect(refusal).toMatchObject({ issues: [{ field: 'passwordAgain' }] });
	});
});
