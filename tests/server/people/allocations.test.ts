import { describe, expect, it } from 'vitest';
import { Forbidden, NotFound } from '$lib/server/errors';
import * as allocations from '$lib/server/services/allocations';
import * as deputies from '$lib/server/services/deputies';
import * as log from '$lib/server/services/log';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeProject } from '../../factories/project';
import { refusalOf } from './refusal';

async function sealed() {
	const pi = await makeActor('pi');
	const [animal, project] = await Promise.all([makeAnimal(), makeProject()]);
	const input = { projectId: project.id, animalId: animal.id, groupLabel: 'saline group' };
	return { pi, animal, input, id: await allocations.seal(pi, input) };
}

describe('a sealed allocation', () => {
	it('is opened by who may read it, and each opening stands in the log before it is shown', async () => {
		const { pi, animal, id } = await sealed();
		const reader = await makeActor('experimenter');
		expect(await allocations.read(reader, id)).toEqual({ groupLabel: 'saline group' });
		await allocations.read(reader, id);
		const { items } = await log.page(pi, { subjectId: animal.id, action: 'allocation.unsealed' });
		expect(items).toHaveLength(2);
		expect(items[0]).toMatchObject({ personId: reader.personId, detail: { allocationId: id } });
	});

	it('names its group neither in lists nor in the log', async () => {
		const { pi, id } = await sealed();
		await allocations.withdraw(pi, id, 'wrong project');
		const { pi: other } = await sealed();
		expect(JSON.stringify(await allocations.list(other))).not.toContain('saline');
		expect(JSON.stringify(await log.page(other))).not.toContain('saline');
	});

	it('stays shut for blinded people, a blinded PI included', async () => {
		const { input, id } = await sealed();
		for (const role of ['experimenter', 'pi'] as const) {
			const blinded = { ...(await makeActor(role)), isBlinded: true };
			await expect(allocations.list(blinded, input.projectId)).rejects.toThrow(/blinded/);
			await expect(allocations.read(blinded, id)).rejects.toThrow(/blinded/);
		}
	});

	it.each(['welfare', 'admin'] as const)('stays shut for %s', async (role) => {
		const { id } = await sealed();
		const by = await makeActor(role);
		await expect(allocations.read(by, id)).rejects.toThrow(Forbidden);
	});

	it('is sealed and withdrawn by PIs alone, once an animal and project', async () => {
		const { pi, input, id } = await sealed();
		const other = await makeActor('experimenter', 'surgeon', 'admin');
		await expect(allocations.seal(other, input)).rejects.toThrow(Forbidden);
		await expect(allocations.withdraw(other, id, 'no')).rejects.toThrow(Forbidden);
		expect((await refusalOf(allocations.seal(pi, input))).code).toBe('allocated-already');
		await allocations.withdraw(pi, id, 'entered for the wrong animal');
		await expect(allocations.read(pi, id)).rejects.toThrow(NotFound);
		await expect(allocations.seal(pi, input)).resolves.toBeTruthy();
	});
});

describe('a deputy', () => {
	it('is named and ended by a PI, for one animal', async () => {
		const pi = await makeActor('pi');
		const deputy = await makeActor('experimenter');
		const [animal, other] = await Promise.all([makeAnimal(), makeAnimal()]);
		await deputies.name(pi, animal.id, deputy.personId);
		expect(await deputies.isDeputy(deputy, animal.id)).toBe(true);
		expect(await deputies.isDeputy(deputy, other.id)).toBe(false);
		const twice = deputies.name(pi, animal.id, deputy.personId);
		expect((await refusalOf(twice)).code).toBe('deputy-already');
		const [entry] = await deputies.list(deputy, animal.id);
		await deputies.end(pi, entry.id);
		expect(await deputies.isDeputy(deputy, animal.id)).toBe(false);
		expect((await refusalOf(deputies.end(pi, entry.id))).code).toBe('ended');
	});

	it('is not named by anybody else, nor a PI by themselves', async () => {
		const animal = await makeAnimal();
		const by = await makeActor('experimenter', 'surgeon', 'welfare', 'admin');
		await expect(deputies.name(by, animal.id, by.personId)).rejects.toThrow(Forbidden);
		const pi = await makeActor('pi');
		const self = await refusalOf(deputies.name(pi, animal.id, pi.personId));
		expect(self).toMatchObject({ issues: [{ field: 'personId' }] });
	});
});
