import { beforeAll, describe, expect, it } from 'vitest';
import { Forbidden, NotFound, Unauthenticated } from '$lib/server/errors';
import * as animals from '$lib/server/services/animals';
import * as weights from '$lib/server/services/weights';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeImplant } from '../../factories/implant';
import { makeProtocol } from '../../factories/protocol';

let experimenter: Awaited<ReturnType<typeof makeActor>>;

beforeAll(async () => {
	experimenter = await makeActor('experimenter');
});

describe('a weight', () => {
	it('is refused to nobody signed in, to observers and welfare, and for an unknown animal', async () => {
		const { code } = await makeAnimal();
		const [observer, welfare] = await Promise.all([makeActor('observer'), makeActor('welfare')]);
		await expect(weights.record(null, code, { grossG: 400 })).rejects.toThrow(Unauthenticated);
		await expect(weights.record(observer, code, { grossG: 400 })).rejects.toThrow(Forbidden);
		await expect(weights.record(welfare, code, { grossG: 400 })).rejects.toThrow(Forbidden);
		await expect(weights.record(experimenter, 'X99', { grossG: 400 })).rejects.toThrow(NotFound);
		await expect(weights.list(welfare, code)).resolves.toEqual([]);
	});

	it.each([
		['of nothing', { grossG: 0 }, 'grossG'],
		['of tomorrow', { grossG: 400, measuredAt: new Date('2099-01-01T08:00:00Z') }, 'measuredAt']
	])('%s is refused', async (_, input, field) => {
		const { code } = await makeAnimal();
		await expect(weights.record(experimenter, code, input)).rejects.toMatchObject({
			issues: [{ field }]
		});
	});

	it('has the implants carried on its day taken off, and those made later not', async () => {
		const animal = await makeAnimal();
		await makeImplant({ animalId: animal.id, tetrodes: 1, surgeryDay: '2026-03-01', massG: 18 });
		const weigh = (at: string) =>
			weights.record(experimenter, animal.code, { grossG: 400, measuredAt: new Date(at) });
		expect((await weigh('2026-02-20T09:00:00Z')).netG).toBe(400);
		expect((await weigh('2026-03-05T09:00:00Z')).netG).toBe(382);
	});

	it('below the mass of the implant is refused rather than kept as nothing', async () => {
		const animal = await makeAnimal();
		await makeImplant({ animalId: animal.id, tetrodes: 1, massG: 18 });
		await expect(weights.record(experimenter, animal.code, { grossG: 17 })).rejects.toMatchObject({
			issues: [{ field: 'grossG' }]
		});
	});

	it('is measured against the floor of the protocol of its day', async () => {
		const protocol = await makeProtocol({ weightFloorPercent: 85 });
		const { code } = await animals.create(experimenter, {
			code: 'W1',
			species: 'rat',
			sex: 'male',
			baselineWeightG: 400,
			protocol: protocol.number,
			memberSince: '2026-03-01'
		});
		for (const [at, grossG] of [
			['2026-02-20T09:00:00Z', 330],
			['2026-03-05T09:00:00Z', 339],
			['2026-03-06T09:00:00Z', 340]
		] as const) {
			await weights.record(experimenter, code, { grossG, measuredAt: new Date(at) });
		}
		const rows = await weights.list(experimenter, code);
		expect(rows.map((row) => row.floorG)).toEqual([null, 340, 340]);
		expect(rows.map((row) => row.isBelowFloor)).toEqual([false, true, false]);
		expect(rows.every((row) => row.isEnteredLater)).toBe(true);
	});

	it('is withdrawn once, with a reason, by its own animal only', async () => {
		const [{ code }, other] = await Promise.all([makeAnimal(), makeAnimal()]);
		const { id } = await weights.record(experimenter, code, { grossG: 40 });
		const why = { why: 'Typed 40 for 400' };
		await expect(weights.withdraw(experimenter, other.code, id, why)).rejects.toThrow(NotFound);
		await weights.withdraw(experimenter, code, id, why);
		const [row] = await weights.list(experimenter, code);
		expect(row.withdrawn?.why).toBe('Typed 40 for 400');
		expect((await animals.get(experimenter, code)).weight).toBeNull();
		await expect(weights.withdraw(experimenter, code, id, why)).rejects.toMatchObject({
			code: 'withdrawn'
		});
	});
});
