import { describe, expect, it } from 'vitest';
import { Conflict, Forbidden } from '$lib/server/errors';
import { Person } from '$lib/server/models/person';
import { RoleGrant } from '$lib/server/models/role-grant';
import * as members from '$lib/server/services/members';
import * as passwords from '$lib/server/services/passwords';
import * as people from '$lib/server/services/people';
import * as signIns from '$lib/server/services/sign-ins';
import * as tokens from '$lib/server/services/tokens';
import { actorOf, makeActor } from '../../factories/actor';
import { makePerson } from '../../factories/person';
import { nextNumber } from '../../factories/sequence';
import { newestMail } from './mailbox';
import { refusalOf } from './refusal';

const from = () => ({ address: `10.3.0.${nextNumber()}`, userAgent: 'test' });

/** The tests before may have left PIs; these need to know who is the last. */
async function onlyPis(...roles: 'pi'[][]) {
	await RoleGrant.update({ revokedAt: new Date() }, { where: { role: 'pi', revokedAt: null } });
	return Promise.all(roles.map((own) => makeActor(...own)));
}

describe('roles', () => {
	it('are given and taken, and remembered with who did it', async () => {
		const pi = await makeActor('pi');
		const person = await makePerson({ roles: ['observer'] });
		await members.grant(pi, person.id, 'surgeon');
		await members.revoke(pi, person.id, 'observer');
		const found = (await members.list(pi)).find(({ id }) => id === person.id);
		expect(found?.roles).toEqual(['surgeon']);
		const [ended] = await RoleGrant.findAll({ where: { personId: person.id, role: 'observer' } });
		expect(ended.revokedBy).toBe(pi.personId);
	});

	it('are not given twice nor taken when not held', async () => {
		const pi = await makeActor('pi');
		const person = await makePerson({ roles: ['observer'] });
		expect((await refusalOf(members.grant(pi, person.id, 'observer'))).code).toBe('role-held');
		expect((await refusalOf(members.revoke(pi, person.id, 'surgeon'))).code).toBe('role-not-held');
	});

	it.each(['observer', 'experimenter', 'surgeon', 'welfare'] as const)(
		'are not changed by a %s, not even their own',
		async (role) => {
			const by = await makeActor(role);
			await expect(members.grant(by, by.personId, 'pi')).rejects.toThrow(Forbidden);
			await expect(members.revoke(by, by.personId, role)).rejects.toThrow(Forbidden);
			await expect(members.deactivate(by, by.personId)).rejects.toThrow(Forbidden);
			await expect(members.setBlinded(by, by.personId, false)).rejects.toThrow(Forbidden);
		}
	);

	it('of others are changed by an admin, except PI; their own are not', async () => {
		const admin = await makeActor('admin');
		const pi = await makeActor('pi');
		const person = await makePerson({ roles: ['observer'] });
		await members.grant(admin, person.id, 'experimenter');
		await expect(members.grant(admin, person.id, 'pi')).rejects.toThrow(/Only a PI/);
		await expect(members.revoke(admin, pi.personId, 'pi')).rejects.toThrow(/Only a PI/);
		await expect(members.grant(admin, admin.personId, 'surgeon')).rejects.toThrow(/their own/);
		await expect(members.deactivate(admin, pi.personId)).rejects.toThrow(/Only a PI/);
		await expect(members.setBlinded(admin, person.id, true)).rejects.toThrow(Forbidden);
	});

	it('leave the lab its last PI', async () => {
		const [pi] = await onlyPis(['pi']);
		const lost = await refusalOf(members.revoke(pi, pi.personId, 'pi'));
		expect(lost).toBeInstanceOf(Conflict);
		expect(lost.code).toBe('last-pi');
		expect((await refusalOf(members.deactivate(pi, pi.personId))).code).toBe('last-pi');
	});

	it('leave one PI when two remove each other at once', async () => {
		const [one, two] = await onlyPis(['pi'], ['pi']);
		const both = await Promise.allSettled([
			members.revoke(one, two.personId, 'pi'),
			members.deactivate(two, one.personId)
		]);
		expect(both.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
	});

	it('do not count a deactivated PI as one who is left', async () => {
		const [one, two] = await onlyPis(['pi'], ['pi']);
		await members.deactivate(one, two.personId);
		expect((await refusalOf(members.revoke(one, one.personId, 'pi'))).code).toBe('last-pi');
	});
});

describe('deactivating', () => {
	it('ends sessions and tokens at once; letting in again brings back neither', async () => {
		const pi = await makeActor('pi');
		const person = await makePerson({ password: 'lowering slowly' });
		const by = actorOf(person, ['experimenter']);
		const given = { email: person.email, password: 'lowering slowly' };
		const cookie = await signIns.signIn(given, from());
		const { secret } = await tokens.create(by, { name: 'script', scope: 'write', days: 5 });

		await members.deactivate(pi, person.id);
		expect((await signIns.read(cookie.value)).actor).toBeNull();
		expect(await tokens.actorFor(secret)).toBeNull();
		expect((await refusalOf(signIns.signIn(given, from()))).code).toBe('wrong-sign-in');

		await members.reactivate(pi, person.id);
		expect((await signIns.read(cookie.value)).actor).toBeNull();
		expect(await tokens.actorFor(secret)).toBeNull();
		await expect(signIns.signIn(given, from())).resolves.toBeTruthy();
	});

	it('keeps the person’s row and name', async () => {
		const pi = await makeActor('pi');
		const person = await makePerson({ name: 'Gone Away' });
		await members.deactivate(pi, person.id);
		const found = (await members.list(pi)).find(({ id }) => id === person.id);
		expect(found).toMatchObject({ name: 'Gone Away', deactivatedAt: expect.any(Date) });
		expect((await people.choices(pi)).map(({ id }) => id)).not.toContain(person.id);
	});
});

describe('the list of members', () => {
	it('tells who is blinded to those who run the membership only', async () => {
		const blinded = await makePerson({ isBlinded: true });
		const seenBy = async (by: Awaited<ReturnType<typeof makeActor>>) =>
			(await members.list(by)).find(({ id }) => id === blinded.id)?.isBlinded;
		expect(await seenBy(await makeActor('observer'))).toBeNull();
		expect(await seenBy(await makeActor('pi'))).toBe(true);
		await expect(members.list(null)).rejects.toThrow('Sign in first.');
	});

	it('never carries a password’s hash', async () => {
		await makePerson({ password: 'lowering slowly' });
		expect(JSON.stringify(await members.list(await makeActor('pi')))).not.toContain('argon2');
	});
});

describe('a person’s own profile', () => {
	it('is edited from the version that was read, else nothing is overwritten', async () => {
		const by = await makeActor('observer');
		const { revision } = await people.profile(by);
		await people.editProfile(by, { name: 'Renamed', timeZone: 'Asia/Tokyo', revision });
		expect(await people.profile(by)).toMatchObject({ timeZone: 'Asia/Tokyo', revision: 1 });
		const stale = await refusalOf(
			people.editProfile(by, { name: 'Other', timeZone: '', revision })
		);
		expect(stale.code).toBe('stale');
		expect((await Person.findByPk(by.personId))?.name).toBe('Renamed');
	});

	it('changes the password for who knows the present one, and ends other browsers', async () => {
		const person = await makePerson({ password: 'lowering slowly' });
		const by = actorOf(person, ['experimenter']);
		const given = { email: person.email, password: 'lowering slowly' };
		const here = await signIns.signIn(given, from());
		const there = await signIns.signIn(given, from());
		const change = (currentPassword: string) =>
			passwords.change(
				by,
				{ currentPassword, password: 'slowly lowering', passwordAgain: 'slowly lowering' },
				here.value
			);
		expect(await refusalOf(change('a wrong one'))).toMatchObject({
			issues: [{ field: 'currentPassword' }]
		});
		await change('lowering slowly');
		expect((await signIns.read(here.value)).actor).not.toBeNull();
		expect((await signIns.read(there.value)).actor).toBeNull();
		expect((await newestMail(person.email)).text).toMatch(/was changed/);
	});
});
