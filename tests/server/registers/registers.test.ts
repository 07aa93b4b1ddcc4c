import { beforeAll, describe, expect, it } from 'vitest';
import { registerKinds, type RegisterKind } from '$lib/schemas/registers';
import type { Actor } from '$lib/server/access';
import { Conflict, Forbidden, Invalid, NotFound, Unauthenticated } from '$lib/server/errors';
import * as registers from '$lib/server/services/registers';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeDriveDesign } from '../../factories/drive-design';
import { makeDrive } from '../../factories/drive';
import { makeImplant } from '../../factories/implant';
import { makePerson } from '../../factories/person';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';

const NOBODY = '01890a5d-ac96-774b-bcce-b302099a8057';

let pi: Actor;
let observer: Actor;
let admin: Actor;
const inputs: Partial<Record<RegisterKind, Record<string, unknown>>> = {};

beforeAll(async () => {
	[pi, observer, admin] = await Promise.all([
		makeActor('pi'),
		makeActor('observer'),
		makeActor('admin')
	]);
	const design = await makeDriveDesign();
	Object.assign(inputs, {
		projects: { name: 'Remapping', summary: 'Do fields move?' },
		protocols: {
			number: '24-117',
			title: 'Place cells',
			animalsAllowed: 20,
			surgeriesAllowed: 1,
			restriction: 'food',
			weightFloorPercent: 85,
			longestImplantDays: null,
			expiresOn: '2099-01-31'
		},
		arenas: {
			name: 'Long track',
			description: 'straight:300',
			binCm: 5,
			pxPerCm: null,
			endAX: null,
			endAY: null,
			endBX: null,
			endBY: null
		},
		rigs: { name: 'Rig 2', place: 'B14' },
		'drive-designs': {
			name: 'Sixteen',
			thread: '0-80 UNF',
			pitchUm: null,
			travelMm: 6,
			smallestStepTurns: 0.125
		},
		drives: { designId: design.id, serial: 'D-14', measuredPitchUm: null, massG: 14 }
	});
});

const inputOf = (kind: RegisterKind) => ({ ...inputs[kind] });

describe.each(registerKinds)('register of %s', (kind) => {
	it('is closed to nobody signed in and to those without the record', async () => {
		await expect(registers.list(null, kind)).rejects.toThrow(Unauthenticated);
		await expect(registers.list(admin, kind)).rejects.toThrow(Forbidden);
		await expect(registers.get(null, kind, NOBODY)).rejects.toThrow(Unauthenticated);
	});

	it('lets an observer read and never write', async () => {
		await expect(registers.list(observer, kind)).resolves.toBeInstanceOf(Array);
		await expect(registers.create(observer, kind, inputOf(kind))).rejects.toThrow(Forbidden);
		await expect(registers.edit(observer, kind, NOBODY, inputOf(kind))).rejects.toThrow(Forbidden);
		await expect(registers.withdraw(observer, kind, NOBODY, 'x')).rejects.toThrow(Forbidden);
		await expect(registers.restore(observer, kind, NOBODY)).rejects.toThrow(Forbidden);
	});

	it('knows no row of an unknown id', async () => {
		await expect(registers.get(pi, kind, NOBODY)).rejects.toThrow(NotFound);
		await expect(registers.edit(pi, kind, NOBODY, inputOf(kind))).rejects.toThrow(NotFound);
		await expect(registers.withdraw(pi, kind, NOBODY, 'x')).rejects.toThrow(NotFound);
	});

	it('refuses an empty input, naming the fields', async () => {
		const refusal = registers.create(pi, kind, {});
		await expect(refusal).rejects.toThrow(Invalid);
		await expect(refusal).rejects.toMatchObject({
			issues: expect.arrayContaining([expect.objectContaining({ field: expect.any(String) })])
		});
	});

	it('keeps what a PI enters, refuses a second of the same name, and a stale edit', async () => {
		const { id } = await registers.create(pi, kind, inputOf(kind));
		expect((await registers.get(observer, kind, id)).values).toMatchObject(
			Object.fromEntries(Object.entries(inputOf(kind)).filter(([, value]) => value !== null))
		);
		await expect(registers.create(pi, kind, inputOf(kind))).rejects.toThrow(Conflict);

		await registers.edit(pi, kind, id, { ...inputOf(kind), revision: 0 });
		expect((await registers.get(pi, kind, id)).revision).toBe(1);
		await expect(
			registers.edit(pi, kind, id, { ...inputOf(kind), revision: 0 })
		).rejects.toMatchObject({ code: 'stale' });
	});

	it('takes a row out of use and back, keeping the reason', async () => {
		const [{ id }] = await registers.list(pi, kind);
		await registers.withdraw(pi, kind, id, 'Entered twice');
		expect((await registers.list(pi, kind)).map((row) => row.id)).not.toContain(id);
		const all = await registers.list(pi, kind, { isWithWithdrawn: true });
		expect(all.find((row) => row.id === id)?.withdrawn?.why).toBe('Entered twice');
		await expect(
			registers.edit(pi, kind, id, { ...inputOf(kind), revision: 1 })
		).rejects.toMatchObject({ code: 'withdrawn' });

		await registers.restore(pi, kind, id);
		expect((await registers.list(pi, kind)).map((row) => row.id)).toContain(id);
	});
});

describe('protocols', () => {
	const protocol = () => ({ ...inputOf('protocols'), number: '24-200' });

	it('name people from a day on, and keep who was named before', async () => {
		const [first, second] = await Promise.all([makePerson(), makePerson()]);
		const { id } = await registers.create(pi, 'protocols', { ...protocol(), people: [first.id] });
		await registers.edit(pi, 'protocols', id, { ...protocol(), people: [second.id], revision: 0 });
		expect((await registers.get(pi, 'protocols', id)).values.people).toEqual([second.id]);
	});

	it('refuse a person who is no member', async () => {
		const input = { ...protocol(), number: '24-201', people: [NOBODY] };
		await expect(registers.create(pi, 'protocols', input)).rejects.toMatchObject({
			issues: [{ field: 'people' }]
		});
		const numbers = (await registers.list(pi, 'protocols')).map((row) => row.values.number);
		expect(numbers).not.toContain('24-201');
	});

	it('count every animal that was ever on them, and mark those expired', async () => {
		const { id } = await registers.create(pi, 'protocols', {
			...protocol(),
			number: '24-202',
			expiresOn: '2020-01-01'
		});
		const animal = await makeAnimal();
		await AnimalProtocol.create({
			animalId: animal.id,
			protocolId: id,
			fromDay: '2019-01-01',
			untilDay: '2019-02-01'
		});
		expect((await registers.get(pi, 'protocols', id)).values).toMatchObject({
			animalsLeft: 19,
			isExpired: true
		});
	});
});

describe('drives and designs', () => {
	it('take the pitch of the chosen thread', async () => {
		const { id } = await registers.create(pi, 'drive-designs', {
			...inputOf('drive-designs'),
			name: 'By thread',
			thread: 'M1.4 × 0.3'
		});
		expect((await registers.get(pi, 'drive-designs', id)).values.pitchUm).toBe(300);
	});

	it('say which animal a drive is in', async () => {
		const drive = await makeDrive();
		const animal = await makeAnimal();
		await makeImplant({ animalId: animal.id, driveId: drive.id, driveDesignId: drive.designId });
		const row = await registers.get(observer, 'drives', drive.id);
		expect(row.values.usedIn).toBe(animal.code);
	});

	it('offer choices by name, without what is withdrawn', async () => {
		const offered = await registers.choices(observer, 'drive-designs');
		expect(offered.map((choice) => choice.label)).toContain('By thread');
	});
});
