import { beforeAll, describe, expect, it } from 'vitest';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import { ProtocolPerson } from '$lib/server/models/protocol-person';
import * as implants from '$lib/server/services/implants';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeDriveDesign } from '../../factories/drive-design';
import { makeProtocol } from '../../factories/protocol';
import { coverAnimal } from './cover-animal';

let surgeon: Awaited<ReturnType<typeof makeActor>>;
let driveDesign: string;

beforeAll(async () => {
	surgeon = await makeActor('surgeon');
	driveDesign = (await makeDriveDesign()).name;
});

const implant = (code: string, fields = {}) =>
	implants.create(surgeon, code, {
		surgeryDate: '2026-03-01',
		driveDesign,
		sites: [
			{
				label: 'CA1',
				carriages: [{ label: 'C1', bundles: [{ label: 'T01', kind: 'tetrode', channels: 4 }] }]
			}
		],
		...fields
	});

describe('a surgery the protocol does not cover is refused', () => {
	it('when the animal is on none that day', async () => {
		const { code } = await makeAnimal();
		await expect(implant(code)).rejects.toMatchObject({ code: 'no-protocol' });
		const covered = await coverAnimal({ surgeon: surgeon.personId });
		await expect(implant(covered.code, { surgeryDate: '2025-12-31' })).rejects.toMatchObject({
			code: 'no-protocol'
		});
	});

	it('when it had expired, with its last day', async () => {
		const { code } = await coverAnimal({ surgeon: surgeon.personId, expiresOn: '2026-02-28' });
		const refused = implant(code);
		await expect(refused).rejects.toMatchObject({ code: 'protocol-expired' });
		await expect(refused).rejects.toThrow('28 Feb 2026');
		// Its last day is still covered.
		await expect(implant(code, { surgeryDate: '2026-02-28' })).resolves.toBeTruthy();
	});

	it('when its surgeries are used, also by two writers at once', async () => {
		const { code } = await coverAnimal({ surgeon: surgeon.personId, surgeriesAllowed: 1 });
		const both = await Promise.allSettled([implant(code), implant(code)]);
		expect(both.map((one) => one.status).toSorted()).toEqual(['fulfilled', 'rejected']);
		await expect(implant(code)).rejects.toMatchObject({ code: 'surgeries-used' });
	});

	it('when it does not name the surgeon', async () => {
		const other = await makeActor('surgeon');
		const { code } = await coverAnimal({ surgeon: other.personId });
		await expect(implant(code)).rejects.toMatchObject({ code: 'not-named' });
		await expect(implant(code, { surgeon: other.personId })).resolves.toBeTruthy();
	});

	it('when the named person is no surgeon', async () => {
		const experimenter = await makeActor('experimenter');
		const { code } = await coverAnimal({ surgeon: experimenter.personId });
		await expect(implant(code, { surgeon: experimenter.personId })).rejects.toMatchObject({
			issues: [{ field: 'surgeon' }]
		});
	});

	it('when the surgeon had left the protocol before that day', async () => {
		const [animal, protocol] = await Promise.all([makeAnimal(), makeProtocol()]);
		await AnimalProtocol.create({
			animalId: animal.id,
			protocolId: protocol.id,
			fromDay: '2026-01-01'
		});
		await ProtocolPerson.create({
			protocolId: protocol.id,
			personId: surgeon.personId,
			fromDay: '2025-01-01',
			untilDay: '2026-02-01'
		});
		await expect(implant(animal.code)).rejects.toMatchObject({ code: 'not-named' });
	});
});
