import { beforeAll, describe, expect, it, vi } from 'vitest';
import { db } from '$lib/server/db';
import { Conflict, Forbidden, Invalid, NotFound, Unauthenticated } from '$lib/server/errors';
import { select } from '$lib/server/select';
import * as animals from '$lib/server/services/animals';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeImplant } from '../../factories/implant';
import { makeProject } from '../../factories/project';
import { makeProtocol } from '../../factories/protocol';
import { makeWeight } from '../../factories/weight';

type Made = Awaited<ReturnType<typeof makeActor>>;

let experimenter: Made;
let observer: Made;
let welfare: Made;
let admin: Made;

beforeAll(async () => {
	[experimenter, observer, welfare, admin] = await Promise.all([
		makeActor('experimenter'),
		makeActor('observer'),
		makeActor('welfare'),
		makeActor('admin')
	]);
});

const rat = (code: string) => ({ code, species: 'rat' as const, sex: 'male' as const });

describe('reading animals', () => {
	it('is refused to nobody signed in, and to an admin, who reads no animal data', async () => {
		const { code } = await makeAnimal();
		await expect(animals.list(null)).rejects.toThrow(Unauthenticated);
		await expect(animals.list(admin)).rejects.toThrow(Forbidden);
		await expect(animals.get(null, code)).rejects.toThrow(Unauthenticated);
		await expect(animals.get(admin, code)).rejects.toThrow(Forbidden);
		await expect(animals.strip(admin, code)).rejects.toThrow(Forbidden);
	});

	it('knows no animal of another code', async () => {
		await expect(animals.get(observer, 'X999')).rejects.toThrow(NotFound);
	});

	it('finds a code however its letters are written', async () => {
		const { code } = await makeAnimal({ code: 'Rq77' });
		expect((await animals.get(observer, 'RQ77')).code).toBe(code);
	});

	it('shows latest weight, floor, protocol and implant', async () => {
		const protocol = await makeProtocol({ weightFloorPercent: 85 });
		const project = await makeProject();
		const { code, id } = {
			...rat('R800'),
			...(await animals.create(experimenter, {
				...rat('R800'),
				baselineWeightG: 400,
				protocol: protocol.number,
				project: project.name
			}))
		};
		await makeWeight({ animalId: id, grossG: 390, measuredAt: new Date('2026-03-02T08:00:00Z') });
		await makeWeight({ animalId: id, grossG: 380, measuredAt: new Date('2026-03-01T08:00:00Z') });
		await makeImplant({ animalId: id, tetrodes: 2, surgeryDay: '2026-03-01' });

		const row = (await animals.list(observer)).find((animal) => animal.code === code);
		expect(row).toMatchObject({ protocol: protocol.number, floorShare: 0.85 });
		expect(row?.projects).toEqual([project.name]);
		expect(row?.weight?.at).toBe('2026-03-02T08:00:00.000Z');
		expect(row?.implants[0]).toMatchObject({ letter: 'A', surgeryDay: '2026-03-01' });

		const header = await animals.header(welfare, code);
		expect(header.implant?.summary).toBe('right dorsal CA1, 2 tetrodes');
	});

	it('asks the database as often for many animals as for one', async () => {
		const query = vi.spyOn(db(), 'query');
		await animals.list(observer);
		const before = query.mock.calls.length;
		await Promise.all([makeAnimal(), makeAnimal(), makeAnimal()]);
		query.mockClear();
		await animals.list(observer);
		expect(query).toHaveBeenCalledTimes(before);
		query.mockRestore();
	});
});

describe('a new animal', () => {
	it('is refused to observers, welfare and those not signed in', async () => {
		await expect(animals.create(null, rat('R1'))).rejects.toThrow(Unauthenticated);
		await expect(animals.create(observer, rat('R1'))).rejects.toThrow(Forbidden);
		await expect(animals.create(welfare, rat('R1'))).rejects.toThrow(Forbidden);
	});

	it('is refused with a code nobody could write on a cage', async () => {
		await expect(animals.create(experimenter, rat('R 1'))).rejects.toMatchObject({
			issues: [{ field: 'code' }]
		});
	});

	it('cannot take a code in other letters', async () => {
		await animals.create(experimenter, rat('R501'));
		await expect(animals.create(experimenter, rat('r501'))).rejects.toMatchObject({
			code: 'code-taken'
		});
	});

	it('is logged with the person who entered it', async () => {
		const { id } = await animals.create(experimenter, rat('R502'));
		const rows = await select<{ action: string; person_id: string }>(
			'SELECT action, person_id FROM log WHERE subject_id = $id',
			{ id }
		);
		expect(rows).toEqual([{ action: 'animal.create', person_id: experimenter.personId }]);
	});

	it('is not kept when its protocol is not in use', async () => {
		const input = { ...rat('R503'), protocol: 'none-such' };
		await expect(animals.create(experimenter, input)).rejects.toMatchObject({
			issues: [{ field: 'protocol' }]
		});
		await expect(animals.get(observer, 'R503')).rejects.toThrow(NotFound);
	});
});

describe('an edit', () => {
	it('is refused to an observer and for an unknown animal', async () => {
		const { code } = await makeAnimal();
		const edit = { ...rat(code), revision: 0 };
		await expect(animals.edit(observer, code, edit)).rejects.toThrow(Forbidden);
		await expect(animals.edit(experimenter, 'X999', edit)).rejects.toThrow(NotFound);
	});

	it('is kept once, and the same form sent again is stale', async () => {
		const { code } = await makeAnimal();
		const edit = { ...rat(code), strain: 'Long-Evans', revision: 0 };
		await animals.edit(experimenter, code, edit);
		expect(await animals.get(observer, code)).toMatchObject({ strain: 'Long-Evans', revision: 1 });
		const again = animals.edit(experimenter, code, { ...edit, strain: 'Wistar' });
		await expect(again).rejects.toMatchObject({ code: 'stale' });
		expect((await animals.get(observer, code)).strain).toBe('Long-Evans');
	});
});

describe('a withdrawn animal', () => {
	it('is gone from pages, keeps its code, and can come back', async () => {
		const { code } = await makeAnimal();
		await expect(animals.withdraw(observer, code, 'twice')).rejects.toThrow(Forbidden);
		await expect(animals.withdraw(experimenter, code, ' ')).rejects.toThrow(Invalid);
		await animals.withdraw(experimenter, code, 'Entered twice');
		await expect(animals.get(observer, code)).rejects.toThrow(NotFound);
		await expect(animals.create(experimenter, rat(code))).rejects.toThrow(Conflict);
		await animals.restore(experimenter, code);
		expect((await animals.get(observer, code)).code).toBe(code);
	});
});
