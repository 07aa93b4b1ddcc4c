import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { setClock } from '$lib/server/clock';
import { Invalid, NotFound, TooMany, Unauthenticated } from '$lib/server/errors';
import { AuthSession } from '$lib/server/models/auth-session';
import * as members from '$lib/server/services/members';
import * as signIns from '$lib/server/services/sign-ins';
import { actorOf, makeActor } from '../../factories/actor';
import { makePerson } from '../../factories/person';
import { nextNumber } from '../../factories/sequence';
import { refusalOf } from './refusal';

const PASSWORD = 'lowering slowly';

/** Each test comes from an address of its own: limits count per address. */
const from = () => ({ address: `10.0.0.${nextNumber()}`, userAgent: 'test' });

async function signedIn() {
	const person = await makePerson({ roles: ['experimenter'], password: PASSWORD });
	const cookie = await signIns.signIn({ email: person.email, password: PASSWORD }, from());
	return { person, by: actorOf(person, ['experimenter']), sessionId: cookie.value, cookie };
}

describe('signing in', () => {
	it('answers a wrong password, an unknown address and a deactivated person alike', async () => {
		const active = await makePerson({ password: PASSWORD });
		const gone = await makePerson({ password: PASSWORD, deactivatedAt: new Date() });
		const unset = await makePerson();
		const refusals = await Promise.all(
			[
				{ email: active.email, password: 'not the password' },
				{ email: 'nobody@lab.example', password: PASSWORD },
				{ email: gone.email, password: PASSWORD },
				{ email: unset.email, password: PASSWORD }
			].map((given) => refusalOf(signIns.signIn(given, from())))
		);
		for (const refusal of refusals) {
			expect(refusal).toBeInstanceOf(Invalid);
			expect(refusal.message).toBe('The mail address or the password is not right.');
			expect(refusal.code).toBe('wrong-sign-in');
		}
	});

	it('gives a cookie no script can read, and not only-secure on plain http', async () => {
		const { cookie } = await signedIn();
		expect(cookie.attributes).toMatchObject({ httpOnly: true, sameSite: 'lax', secure: false });
		expect(cookie.attributes.maxAge).toBe(30 * 24 * 60 * 60);
	});

	it('keeps only a hash of what the cookie holds', async () => {
		const { sessionId } = await signedIn();
		expect(await AuthSession.findByPk(sessionId)).toBeNull();
		const hash = createHash('sha256').update(sessionId).digest('hex');
		expect(await AuthSession.findByPk(hash)).not.toBeNull();
	});

	it('makes an account wait after ten wrong tries, also one that does not exist', async () => {
		const person = await makePerson({ password: PASSWORD });
		for (const email of [person.email, 'nobody-at-all@lab.example']) {
			for (let i = 0; i < 10; i += 1) {
				await refusalOf(signIns.signIn({ email, password: 'wrong' }, from()));
			}
			const refusal = await refusalOf(signIns.signIn({ email, password: PASSWORD }, from()));
			expect(refusal).toBeInstanceOf(TooMany);
			expect(refusal.message).toMatch(/^Too many tries\. Wait 1[45] min and try again\.$/);
		}
	});

	it('makes an address wait that tries many accounts', async () => {
		const one = { address: '192.0.2.7', userAgent: null };
		for (let i = 0; i < 60; i += 1) {
			const email = `guess${i}@lab.example`;
			await refusalOf(signIns.signIn({ email, password: 'wrong' }, one));
		}
		const person = await makePerson({ password: PASSWORD });
		const given = { email: person.email, password: PASSWORD };
		expect(await refusalOf(signIns.signIn(given, one))).toBeInstanceOf(TooMany);
		await expect(signIns.signIn(given, from())).resolves.toBeTruthy();
	}, 60_000);

	it('forgets wrong tries once the person has signed in', async () => {
		const person = await makePerson({ password: PASSWORD });
		for (let round = 0; round < 2; round += 1) {
			for (let i = 0; i < 9; i += 1) {
				await refusalOf(signIns.signIn({ email: person.email, password: 'wrong' }, from()));
			}
			await signIns.signIn({ email: person.email, password: PASSWORD }, from());
		}
	});
});

describe('a session', () => {
	it('stands for the person with the roles they hold now', async () => {
		const { person, sessionId } = await signedIn();
		const pi = await makeActor('pi');
		await members.grant(pi, person.id, 'surgeon');
		const { actor } = await signIns.read(sessionId);
		expect(actor).toMatchObject({ personId: person.id, via: 'page', scope: 'write' });
		expect([...(actor?.roles ?? [])].sort()).toEqual(['experimenter', 'surgeon']);
	});

	it('slides in its second half and ends when it is not used', async () => {
		const { sessionId } = await signedIn();
		const hash = createHash('sha256').update(sessionId).digest('hex');
		const inDays = (days: number) => new Date(Date.now() + days * 86_400_000);
		expect((await signIns.read(sessionId)).cookie).toBeNull();

		await AuthSession.update({ expiresAt: inDays(14) }, { where: { idHash: hash } });
		expect((await signIns.read(sessionId)).cookie?.value).toBe(sessionId);
		const [slid] = await AuthSession.findAll({ where: { idHash: hash } });
		expect(slid.expiresAt.getTime()).toBeGreaterThan(inDays(29).getTime());

		await AuthSession.update({ expiresAt: inDays(-1) }, { where: { idHash: hash } });
		const { actor, cookie } = await signIns.read(sessionId);
		expect(actor).toBeNull();
		expect(cookie?.value).toBe('');
	});

	it('stands for nobody when the cookie is made up', async () => {
		expect((await signIns.read('made-up')).actor).toBeNull();
	});

	it('ends at sign-out', async () => {
		const { by, sessionId } = await signedIn();
		await signIns.signOut(by, sessionId);
		expect((await signIns.read(sessionId)).actor).toBeNull();
	});

	it('is cleared from the table once it has run out', async () => {
		const { sessionId } = await signedIn();
		const back = setClock(() => new Date(Date.now() + 31 * 86_400_000));
		await signIns.sweep();
		back();
		expect((await signIns.read(sessionId)).actor).toBeNull();
	});
});

describe('signed-in browsers', () => {
	it('are listed to their person alone, this one marked', async () => {
		const { person, by, sessionId } = await signedIn();
		await signIns.signIn({ email: person.email, password: PASSWORD }, from());
		await signedIn();
		const browsers = await signIns.list(by, sessionId);
		expect(browsers).toHaveLength(2);
		expect(browsers.filter((browser) => browser.isThisOne)).toHaveLength(1);
		await expect(signIns.list(null, null)).rejects.toThrow(Unauthenticated);
	});

	it('cannot be ended by somebody else', async () => {
		const { by, sessionId } = await signedIn();
		const other = await makeActor('pi');
		const [{ key }] = await signIns.list(by, sessionId);
		await expect(signIns.end(other, key)).rejects.toThrow(NotFound);
		await signIns.end(by, key);
		expect((await signIns.read(sessionId)).actor).toBeNull();
	});

	it('all end but the one that asks', async () => {
		const { person, by, sessionId } = await signedIn();
		const other = await signIns.signIn({ email: person.email, password: PASSWORD }, from());
		expect(await signIns.endOthers(by, sessionId)).toBe(1);
		expect((await signIns.read(sessionId)).actor).not.toBeNull();
		expect((await signIns.read(other.value)).actor).toBeNull();
	});
});
