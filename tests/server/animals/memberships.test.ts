import { beforeAll, describe, expect, it } from 'vitest';
import { Forbidden, NotFound, Unauthenticated } from '$lib/server/errors';
import * as animals from '$lib/server/services/animals';
import { today } from '$lib/server/services/lab-clock';
import * as memberships from '$lib/server/services/memberships';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeProject } from '../../factories/project';
import { makeProtocol } from '../../factories/protocol';

let experimenter: Awaited<ReturnType<typeof makeActor>>;

beforeAll(async () => {
	experimenter = await makeActor('experimenter');
});

describe('joining a protocol', () => {
	it('is refused to nobody signed in, to observers, and for an unknown animal', async () => {
		const [{ code }, { id }, observer] = await Promise.all([
			makeAnimal(),
			makeProtocol(),
			makeActor('observer')
		]);
		await expect(memberships.joinProtocol(null, code, { id })).rejects.toThrow(Unauthenticated);
		await expect(memberships.joinProtocol(observer, code, { id })).rejects.toThrow(Forbidden);
		await expect(memberships.joinProtocol(experimenter, 'X99', { id })).rejects.toThrow(NotFound);
	});

	it('is refused by an expired protocol, with the day it ended', async () => {
		const { code } = await makeAnimal();
		const { id } = await makeProtocol({ expiresOn: '2026-01-31' });
		const joining = memberships.joinProtocol(experimenter, code, { id });
		await expect(joining).rejects.toMatchObject({ code: 'protocol-expired' });
		await expect(joining).rejects.toThrow('31 Jan 2026');
	});

	it('may be entered later for days on which the protocol was valid', async () => {
		const { code } = await makeAnimal();
		const { id } = await makeProtocol({ expiresOn: '2026-01-31' });
		await memberships.joinProtocol(experimenter, code, {
			id,
			from: '2025-11-01',
			until: '2026-02-01'
		});
		expect((await animals.get(experimenter, code)).protocols).toHaveLength(1);
	});

	it('is refused when all places are taken, also by an animal that left', async () => {
		const [first, second] = await Promise.all([makeAnimal(), makeAnimal()]);
		const { id } = await makeProtocol({ animalsAllowed: 1 });
		await memberships.joinProtocol(experimenter, first.code, { id, from: '2026-01-01' });
		const { protocols } = await animals.get(experimenter, first.code);
		await memberships.leave(experimenter, first.code, 'protocol', protocols[0].id);
		await expect(memberships.joinProtocol(experimenter, second.code, { id })).rejects.toMatchObject(
			{ code: 'protocol-full' }
		);
		// The animal that had the place may come back to it.
		await memberships.joinProtocol(experimenter, first.code, { id, from: await today() });
	});

	it('gives the last place to one of two writers', async () => {
		const [first, second] = await Promise.all([makeAnimal(), makeAnimal()]);
		const { id } = await makeProtocol({ animalsAllowed: 1 });
		const both = await Promise.allSettled([
			memberships.joinProtocol(experimenter, first.code, { id }),
			memberships.joinProtocol(experimenter, second.code, { id })
		]);
		expect(both.map((one) => one.status).toSorted()).toEqual(['fulfilled', 'rejected']);
	});

	it('is refused while another protocol decides about the animal', async () => {
		const [{ code }, one, other] = await Promise.all([
			makeAnimal(),
			makeProtocol(),
			makeProtocol()
		]);
		await memberships.joinProtocol(experimenter, code, { id: one.id });
		await expect(
			memberships.joinProtocol(experimenter, code, { id: other.id })
		).rejects.toMatchObject({ code: 'protocol-overlap' });
	});
});

describe('projects of an animal', () => {
	it('may be several at once, each with its own days', async () => {
		const [{ code }, one, other] = await Promise.all([makeAnimal(), makeProject(), makeProject()]);
		await memberships.joinProject(experimenter, code, { id: one.id, from: '2026-01-01' });
		await memberships.joinProject(experimenter, code, { id: other.id, from: '2026-01-01' });
		const { projectMemberships } = await animals.get(experimenter, code);
		await memberships.leave(experimenter, code, 'project', projectMemberships[0].id);
		expect((await animals.get(experimenter, code)).projects).toHaveLength(1);
	});

	it('end once, and never before they began', async () => {
		const [{ code }, project] = await Promise.all([makeAnimal(), makeProject()]);
		await memberships.joinProject(experimenter, code, { id: project.id, from: '2026-03-01' });
		const [{ id }] = (await animals.get(experimenter, code)).projectMemberships;
		const leave = (until: string) => memberships.leave(experimenter, code, 'project', id, until);
		await expect(leave('2026-02-01')).rejects.toMatchObject({ code: 'not-begun' });
		await leave('2026-04-01');
		await expect(leave('2026-05-01')).rejects.toMatchObject({ code: 'already-left' });
	});
});
