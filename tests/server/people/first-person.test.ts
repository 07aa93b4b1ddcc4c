import { beforeAll, describe, expect, it } from 'vitest';
import { db } from '$lib/server/db';
import { Forbidden, NotFound } from '$lib/server/errors';
import { Person } from '$lib/server/models/person';
import * as firstPerson from '$lib/server/services/first-person';
import * as invitations from '$lib/server/services/invitations';
import * as labSettings from '$lib/server/services/lab-settings';
import * as people from '$lib/server/services/people';
import * as signIns from '$lib/server/services/sign-ins';
import { actorOf, makeActor } from '../../factories/actor';
import { refusalOf } from './refusal';

const from = { address: '10.5.0.1', userAgent: null };
const first = {
	labName: 'Hippocampus lab',
	timeZone: 'Europe/Oslo',
	name: 'Paula Prime',
	email: 'paula@lab.example',
	password: 'the very first',
	passwordAgain: 'the very first'
};
const secretOf = (address: string | null) => address?.split('/').at(-1) ?? '';

beforeAll(() => db().authenticate());

// In order: an empty lab can be begun once.
describe('an empty lab', () => {
	it('stores a zone at its first start, once', async () => {
		await people.firstAddress();
		const before = await labSettings.current('lab');
		expect(before.version).toBe(1);
		await people.firstAddress();
		expect((await labSettings.current('lab')).version).toBe(1);
	});

	it('gives a new address at each start, and the one before opens nothing', async () => {
		const one = await people.firstAddress('http://lab.example:8080');
		expect(one).toMatch(/^http:\/\/lab\.example:8080\/first\/[\w-]{43}$/);
		const two = await people.firstAddress();
		await expect(firstPerson.check(secretOf(one), from)).rejects.toThrow(NotFound);
		await expect(firstPerson.check(secretOf(two), from)).resolves.toBeUndefined();
		await expect(invitations.find(secretOf(two), from)).rejects.toThrow(NotFound);
	});

	it('is begun once, by one person, who is PI and admin', async () => {
		const secret = secretOf(await people.firstAddress());
		const both = await Promise.allSettled([
			firstPerson.accept(secret, first, from),
			firstPerson.accept(secret, { ...first, email: 'second@lab.example' }, from)
		]);
		const done = both.filter((result) => result.status === 'fulfilled');
		expect(done).toHaveLength(1);
		const { actor } = await signIns.read(done[0].value.value);
		expect([...(actor?.roles ?? [])].sort()).toEqual(['admin', 'pi']);
		expect(await Person.count()).toBe(1);
		expect(await labSettings.get('lab')).toEqual({
			name: 'Hippocampus lab',
			timeZone: 'Europe/Oslo',
			dayStartsAt: '04:00',
			isDemo: false
		});
		expect((await refusalOf(firstPerson.accept(secret, first, from))).code).toBe('first-used');
	});

	it('gives no address once there are people', async () => {
		expect(await people.firstAddress()).toBeNull();
	});
});

describe('the lab’s settings', () => {
	it('are changed by a PI, version by version; the zone stays', async () => {
		const paula = await Person.findOne({ where: { name: 'Paula Prime' } });
		if (!paula) throw new Error('The tests above make Paula');
		const pi = actorOf(paula, ['pi']);
		const { version } = await labSettings.current('lab');
		const change = { name: 'Renamed lab', dayStartsAt: '05:00', version };
		await labSettings.edit(pi, change);
		expect(await labSettings.current('lab')).toMatchObject({
			version: version + 1,
			value: { name: 'Renamed lab', dayStartsAt: '05:00', timeZone: 'Europe/Oslo' }
		});
		expect((await refusalOf(labSettings.edit(pi, change))).code).toBe('stale');
	});

	it('are made one version by two who save at once', async () => {
		const pi = await makeActor('pi');
		const { version } = await labSettings.current('lab');
		const both = await Promise.allSettled(
			['One', 'Two'].map((name) => labSettings.edit(pi, { name, dayStartsAt: '04:00', version }))
		);
		expect(both.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
		expect(both.find(({ status }) => status === 'rejected')).toMatchObject({
			reason: { code: 'stale' }
		});
	});

	it.each(['observer', 'experimenter', 'surgeon', 'welfare', 'admin'] as const)(
		'are not changed by a %s',
		async (role) => {
			const by = await makeActor(role);
			const change = { name: 'X', dayStartsAt: '04:00', version: 1 };
			await expect(labSettings.edit(by, change)).rejects.toThrow(Forbidden);
		}
	);
});
