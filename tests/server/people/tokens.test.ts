import { describe, expect, it } from 'vitest';
import { demand } from '$lib/server/access';
import { setClock } from '$lib/server/clock';
import { Forbidden, Invalid, NotFound } from '$lib/server/errors';
import { ApiToken } from '$lib/server/models/api-token';
import * as members from '$lib/server/services/members';
import * as people from '$lib/server/services/people';
import * as resets from '$lib/server/services/resets';
import * as tokens from '$lib/server/services/tokens';
import { makeActor } from '../../factories/actor';
import { nextNumber } from '../../factories/sequence';
import { newestMail } from './mailbox';
import { refusalOf } from './refusal';

const input = { name: 'rig computer', scope: 'write' as const, days: 30 };

describe('a token', () => {
	it('acts for its owner with the roles they hold at that moment', async () => {
		const owner = await makeActor('experimenter');
		const { secret } = await tokens.create(owner, input);
		await members.grant(await makeActor('pi'), owner.personId, 'surgeon');
		const actor = await tokens.actorFor(secret);
		expect(actor).toMatchObject({ personId: owner.personId, via: 'token', scope: 'write' });
		expect([...(actor?.roles ?? [])].sort()).toEqual(['experimenter', 'surgeon']);
	});

	it('of scope "read" reads, and is refused every write of its owner', async () => {
		const owner = await makeActor('pi');
		const { secret } = await tokens.create(owner, { ...input, scope: 'read' });
		const actor = await tokens.actorFor(secret);
		expect(() => demand(actor, 'data.read')).not.toThrow();
		expect(() => demand(actor, 'turns.write')).toThrow(/may read only/);
	});

	it('is shown once and kept as a hash', async () => {
		const owner = await makeActor('experimenter');
		const { id, secret } = await tokens.create(owner, input);
		expect(secret).toMatch(/^qt_[\w-]{43}$/);
		expect(JSON.stringify(await ApiToken.findByPk(id))).not.toContain(secret);
		const listed = await tokens.list(owner);
		expect(JSON.stringify(listed)).not.toContain(secret);
		expect(listed[0]).toMatchObject({ shownPrefix: secret.slice(0, 8), state: 'in-force' });
	});

	it('stands for nobody when it has expired, was revoked or is made up', async () => {
		const owner = await makeActor('experimenter');
		const { id, secret } = await tokens.create(owner, input);
		const back = setClock(() => new Date(Date.now() + 31 * 86_400_000));
		expect(await tokens.actorFor(secret)).toBeNull();
		back();
		expect(await tokens.actorFor(secret)).not.toBeNull();
		await tokens.revoke(owner, id);
		expect(await tokens.actorFor(secret)).toBeNull();
		expect(await tokens.actorFor('qt_made-up')).toBeNull();
		expect(await tokens.actorFor(null)).toBeNull();
	});

	it('remembers to the minute when it was used', async () => {
		const owner = await makeActor('experimenter');
		const { secret } = await tokens.create(owner, input);
		const at = (iso: string) => setClock(() => new Date(iso));
		const used = async () => (await tokens.list(owner))[0].lastUsedAt?.toISOString();
		let back = at('2026-04-09T10:00:00.000Z');
		await tokens.actorFor(secret);
		back();
		back = at('2026-04-09T10:00:30.000Z');
		await tokens.actorFor(secret);
		expect(await used()).toBe('2026-04-09T10:00:00.000Z');
		back();
		back = at('2026-04-09T10:02:00.000Z');
		await tokens.actorFor(secret);
		back();
		expect(await used()).toBe('2026-04-09T10:02:00.000Z');
	});

	it('does not make tokens', async () => {
		const owner = await makeActor('experimenter');
		const byToken = { ...owner, via: 'token' as const };
		await expect(tokens.create(byToken, input)).rejects.toThrow(Forbidden);
	});

	it.each([0, 367, 1.5])('does not live for %d days', async (days) => {
		const owner = await makeActor('experimenter');
		await expect(tokens.create(owner, { ...input, days })).rejects.toThrow(Invalid);
	});

	it('is revoked by its owner, a PI or an admin; others do not learn that it exists', async () => {
		const owner = await makeActor('experimenter');
		const { id } = await tokens.create(owner, input);
		const other = await makeActor('surgeon');
		await expect(tokens.revoke(other, id)).rejects.toThrow(NotFound);
		await expect(tokens.listAll(other)).rejects.toThrow(Forbidden);
		const admin = await makeActor('admin');
		expect((await tokens.listAll(admin)).map((token) => token.id)).toContain(id);
		await tokens.revoke(admin, id);
		expect((await refusalOf(tokens.revoke(owner, id))).code).toBe('revoked');
	});
});

describe('on the command line', () => {
	it('a person is added, gets a token at once and chooses a password at a one-time address', async () => {
		const email = `cli${nextNumber()}@lab.example`;
		const added = await people.addByCommand({ email, name: 'Cleo', roles: ['experimenter'] });
		const { secret } = await tokens.createByCommand({ email, scope: 'write', days: 7 });
		expect(await tokens.actorFor(secret)).toMatchObject({ personId: added.personId });
		expect(added.address).toContain((await newestMail(email)).secret);
		const pair = { password: 'chosen by Cleo', passwordAgain: 'chosen by Cleo' };
		const reset = added.address.split('/').at(-1) ?? '';
		await resets.complete(reset, pair, { address: '10.4.0.1', userAgent: null });
	});

	it('refuses an address that is taken, and a token for nobody', async () => {
		const email = `cli${nextNumber()}@lab.example`;
		await people.addByCommand({ email, name: 'Cleo', roles: ['observer'] });
		const twice = people.addByCommand({ email, name: 'Cleo', roles: ['observer'] });
		expect((await refusalOf(twice)).code).toBe('email-taken');
		const nobody = tokens.createByCommand({ email: 'no@lab.example', scope: 'read', days: 1 });
		expect((await refusalOf(nobody)).message).toBe(
			'No active person has the mail address no@lab.example.'
		);
	});
});
