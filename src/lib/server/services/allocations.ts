import { z } from 'zod';
import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, NotFound } from '$lib/server/errors';
import { Animal } from '$lib/server/models/animal';
import { Project } from '$lib/server/models/project';
import { SealedAllocation, type AllocationRow } from '$lib/server/models/sealed-allocation';
import { parsed } from '$lib/server/parsed';
import { record } from '$lib/server/record';

export const allocationSchema = z.object({
	projectId: z.uuid(),
	animalId: z.uuid(),
	groupLabel: z.string().trim().min(1, 'Name the group.').max(60)
});

/** That an animal is allotted, not to which group. */
export type Allocation = AllocationRow;

/** Which animals have an allocation; blinded people are refused even this. */
export async function list(by: Actor | null, projectId?: string): Promise<Allocation[]> {
	demand(by, 'allocations.read');
	return SealedAllocation.standing(projectId);
}

/** Opens one. Every opening is in the log, before the group is shown. */
export async function read(by: Actor | null, id: string): Promise<{ groupLabel: string }> {
	demand(by, 'allocations.read');
	return record(by, async (w) => {
		const sealed = await SealedAllocation.findOne({
			where: { id, withdrawnAt: null },
			transaction: w.t
		});
		if (!sealed) throw new NotFound();
		const { animalId, projectId, groupLabel } = sealed;
		await w.log(
			'allocation.unsealed',
			{ kind: 'animal', id: animalId },
			{ allocationId: id, projectId }
		);
		return { groupLabel };
	});
}

/** The log says that, for which animal and project; never the group. */
export async function seal(
	by: Actor | null,
	input: z.infer<typeof allocationSchema>
): Promise<string> {
	demand(by, 'allocations.seal');
	const { projectId, animalId, groupLabel } = parsed(allocationSchema, input);
	const sealedBy = personOf(by);
	return record(by, async (w) => {
		const [project, animal] = await Promise.all([
			Project.findByPk(projectId, { transaction: w.t }),
			Animal.findByPk(animalId, { transaction: w.t })
		]);
		if (!project || !animal) throw new NotFound();
		const { id } = await SealedAllocation.create(
			{ projectId, animalId, groupLabel, sealedBy },
			{ transaction: w.t }
		);
		await w.log(
			'allocation.sealed',
			{ kind: 'animal', id: animalId },
			{ allocationId: id, projectId }
		);
		return id;
	});
}

export async function withdraw(by: Actor | null, id: string, why: string): Promise<void> {
	demand(by, 'allocations.seal');
	const reason = parsed(z.string().trim().min(1, 'Say why.').max(500), why);
	await record(by, async (w) => {
		const sealed = await SealedAllocation.findByPk(id, { transaction: w.t, lock: true });
		if (!sealed) throw new NotFound();
		if (sealed.withdrawnAt) throw new Conflict('withdrawn', 'This was withdrawn already.');
		await sealed.update(
			{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: reason },
			{ transaction: w.t }
		);
		await w.log(
			'allocation.withdrawn',
			{ kind: 'animal', id: sealed.animalId },
			{ allocationId: id }
		);
	});
}
