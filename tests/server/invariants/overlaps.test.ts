import { describe, expect, it } from 'vitest';
import { systemActor } from '$lib/server/access';
import { AnimalProject } from '$lib/server/models/animal-project';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import { BundleRole } from '$lib/server/models/bundle-role';
import { Epoch } from '$lib/server/models/epoch';
import { ProtocolPerson } from '$lib/server/models/protocol-person';
import { record, type Write } from '$lib/server/record';
import { makeAnimal } from '../../factories/animal';
import { makeArena } from '../../factories/arena';
import { makeImplant } from '../../factories/implant';
import { makePerson } from '../../factories/person';
import { makeProject } from '../../factories/project';
import { makeProtocol } from '../../factories/protocol';
import { makeSession } from '../../factories/session';

const written = (work: (t: Write['t']) => Promise<unknown>) =>
	record(systemActor(), async (w) => {
		await work(w.t);
		await w.log('test.write', { kind: 'test', id: null });
	});

describe('two things on the same days', () => {
	it('are refused for the protocol of an animal; the day one ends may start the next', async () => {
		const animalId = (await makeAnimal()).id;
		const join = async (fromDay: string, untilDay: string | null) => {
			const protocolId = (await makeProtocol()).id;
			return written((transaction) =>
				AnimalProtocol.create({ animalId, protocolId, fromDay, untilDay }, { transaction })
			);
		};
		await join('2026-03-01', '2026-03-10');
		await expect(join('2026-03-09', null)).rejects.toMatchObject({ code: 'protocol-overlap' });
		await expect(join('2026-03-10', null)).resolves.toBeUndefined();
	});

	it('are refused for one project of an animal; another project is free', async () => {
		const animalId = (await makeAnimal()).id;
		const projectId = (await makeProject()).id;
		const join = (id: string) =>
			written((transaction) =>
				AnimalProject.create({ animalId, projectId: id, fromDay: '2026-03-01' }, { transaction })
			);
		await join(projectId);
		await expect(join(projectId)).rejects.toMatchObject({ code: 'project-overlap' });
		await expect(join((await makeProject()).id)).resolves.toBeUndefined();
	});

	it('are refused for a person named on a protocol', async () => {
		const row = {
			protocolId: (await makeProtocol()).id,
			personId: (await makePerson()).id,
			fromDay: '2026-03-01'
		};
		const name = () => written((transaction) => ProtocolPerson.create(row, { transaction }));
		await name();
		await expect(name()).rejects.toMatchObject({ code: 'named-already' });
	});

	it('are refused for the role of a bundle', async () => {
		const { bundles } = await makeImplant({ tetrodes: 1 });
		const reference = {
			bundleId: bundles[0].id,
			role: 'reference' as const,
			fromDay: '2026-03-05'
		};
		const change = () => written((transaction) => BundleRole.create(reference, { transaction }));
		await expect(change()).rejects.toMatchObject({ code: 'role-overlap' });
		await BundleRole.update({ untilDay: '2026-03-05' }, { where: { bundleId: bundles[0].id } });
		await expect(change()).resolves.toBeUndefined();
	});
});

describe('epochs of a session', () => {
	it('cannot overlap, may touch, and have names of their own', async () => {
		const sessionId = (await makeSession()).id;
		const add = (name: string, startS: number, stopS: number) =>
			written((transaction) =>
				Epoch.create({ sessionId, name, kind: 'rest', startS, stopS }, { transaction })
			);
		await expect(add('rest', 599, 700)).rejects.toMatchObject({ code: 'epoch-overlap' });
		await expect(add('run', 600, 700)).rejects.toMatchObject({ code: 'epoch-name-taken' });
		await expect(add('rest', 600, 700)).resolves.toBeUndefined();
	});

	it('name the arena when the animal runs', async () => {
		const sessionId = (await makeSession()).id;
		const run = { sessionId, name: 'run 2', kind: 'run' as const, startS: 700, stopS: 800 };
		const add = (arenaId: string | null) =>
			written((transaction) => Epoch.create({ ...run, arenaId }, { transaction }));
		await expect(add(null)).rejects.toMatchObject({ code: 'epoch-needs-arena' });
		await expect(add((await makeArena()).id)).resolves.toBeUndefined();
	});
});
