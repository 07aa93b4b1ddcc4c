import { beforeAll, describe, expect, it } from 'vitest';
import { Forbidden, Invalid, NotFound, Unauthenticated } from '$lib/server/errors';
import * as implants from '$lib/server/services/implants';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeDrive } from '../../factories/drive';
import { makeDriveDesign } from '../../factories/drive-design';
import { makeTurn } from '../../factories/turn';
import { coverAnimal } from './cover-animal';

type Made = Awaited<ReturnType<typeof makeActor>>;

let surgeon: Made;
let observer: Made;
let design: string;

beforeAll(async () => {
	[surgeon, observer] = await Promise.all([makeActor('surgeon'), makeActor('observer')]);
	design = (await makeDriveDesign({ name: 'Sixteen', backlashUm: 40 })).name;
});

const bundle = (label: string) => ({ label, kind: 'tetrode', channels: 4, startDepthUm: 900 });

const given = (fields = {}) => ({
	surgeryDate: '2026-03-01',
	driveDesign: design,
	massG: 18,
	sites: [
		{
			label: 'right dorsal CA1',
			targetLayer: 'CA1 pyramidal',
			carriages: [
				{ label: 'C1', bundles: [bundle('T01')] },
				{ label: 'C2', bundles: [bundle('T02'), { ...bundle('R1'), role: 'reference' }] }
			]
		}
	],
	...fields
});

const covered = (fields = {}) => coverAnimal({ surgeon: surgeon.personId, ...fields });

describe('reading implants', () => {
	it('is refused to nobody signed in and finds none of another letter', async () => {
		const { code } = await makeAnimal();
		await expect(implants.list(null, code)).rejects.toThrow(Unauthenticated);
		await expect(implants.get(observer, code, 'A')).rejects.toThrow(NotFound);
		await expect(implants.get(observer, 'X99', 'A')).rejects.toThrow(NotFound);
	});
});

describe('a new implant', () => {
	it('is refused to everyone but surgeons and PIs', async () => {
		const { code } = await covered();
		const experimenter = await makeActor('experimenter');
		await expect(implants.create(null, code, given())).rejects.toThrow(Unauthenticated);
		await expect(implants.create(observer, code, given())).rejects.toThrow(Forbidden);
		await expect(implants.create(experimenter, code, given())).rejects.toThrow(Forbidden);
		await expect(implants.create(surgeon, 'X99', given())).rejects.toThrow(NotFound);
	});

	it.each([
		['no sites', { sites: [] }, 'sites'],
		['a design the lab does not have', { driveDesign: 'Unheard of' }, 'driveDesign'],
		['a drive not on the shelf', { drive: 'D-0' }, 'drive'],
		['a surgery to come', { surgeryDate: '2099-01-01' }, 'surgeryDate']
	])('is refused with %s', async (_, fields, field) => {
		const { code } = await covered();
		await expect(implants.create(surgeon, code, given(fields))).rejects.toMatchObject({
			issues: [expect.objectContaining({ field })]
		});
		expect(await implants.list(observer, code)).toEqual([]);
	});

	it('keeps sites, screws in the order listed, bundles, roles and channels', async () => {
		const { code } = await covered();
		expect(await implants.create(surgeon, code, given())).toMatchObject({ letter: 'A' });
		const view = await implants.get(observer, code, 'a');
		expect(view).toMatchObject({ pitchUm: 317.5, travelUm: 5000, backlashUm: 40, massG: 18 });
		const [site] = view.sites;
		expect(site.carriages.map((carriage) => carriage.screwOrder)).toEqual([1, 2]);
		const bundles = site.carriages.flatMap((carriage) => carriage.bundles);
		expect(bundles.map((made) => [made.code, made.role, made.channels])).toEqual([
			[`${code}-T01`, 'record', 4],
			[`${code}-R1`, 'reference', 4],
			[`${code}-T02`, 'record', 4]
		]);
		expect(bundles[0].depthUm).toBe(900);
	});

	it('takes pitch and mass that were measured on the drive itself', async () => {
		const { code } = await covered();
		const own = await makeDriveDesign({ name: 'Own pitch' });
		const drive = await makeDrive({ designId: own.id, measuredPitchUm: 318.2, massG: 14 });
		const fields = { driveDesign: own.name, drive: drive.serial, massG: null };
		await implants.create(surgeon, code, given(fields));
		expect(await implants.get(observer, code, 'A')).toMatchObject({ pitchUm: 318.2, massG: 14 });

		const other = await covered();
		await expect(implants.create(surgeon, other.code, given(fields))).rejects.toMatchObject({
			code: 'drive-in-use'
		});
	});

	it('takes a new design in full from a PI only', async () => {
		const driveDesign = {
			name: 'Inline',
			thread: 'M1.4 × 0.3',
			pitchUm: null,
			travelMm: 4,
			smallestStepTurns: 0.25
		};
		const first = await covered();
		await expect(implants.create(surgeon, first.code, given({ driveDesign }))).rejects.toThrow(
			Forbidden
		);
		const pi = await makeActor('pi');
		const { code } = await coverAnimal({ surgeon: pi.personId });
		await implants.create(pi, code, given({ driveDesign }));
		expect(await implants.get(observer, code, 'A')).toMatchObject({ pitchUm: 300, travelUm: 4000 });
	});

	it('gets letter B as the second, and its bundles say so', async () => {
		const { code } = await covered({ surgeriesAllowed: 2 });
		await implants.create(surgeon, code, given());
		expect((await implants.create(surgeon, code, given())).letter).toBe('B');
		const [, second] = await implants.list(observer, code);
		expect(second.sites[0].carriages[0].bundles[0].code).toBe(`${code}-B-T01`);
	});
});

describe('depth', () => {
	it('is start plus travel, slack taken off, with what is left', async () => {
		const { code } = await covered();
		await implants.create(surgeon, code, given());
		const [carriage] = (await implants.get(observer, code, 'A')).sites[0].carriages;
		const turn = (turns: number, at: string) =>
			makeTurn({ carriageId: carriage.id, turns, doneAt: new Date(at) });
		await turn(2, '2026-03-02T10:00:00Z');
		await turn(-0.25, '2026-03-03T10:00:00Z');
		const [after] = (await implants.get(observer, code, 'A')).sites[0].carriages;
		// 2 turns of 317.5 are 635; the quarter back is 79.375, of which 40 are slack.
		expect(after.screwUm).toBeCloseTo(555.625, 6);
		expect(after.bundles[0].depthUm).toBeCloseTo(900 + 595.625, 6);
		expect(after.travelLeftUm).toBeCloseTo(5000 - 595.625, 6);
		const seenByWelfare = await implants.get(await makeActor('welfare'), code, 'A');
		expect(seenByWelfare.sites[0].carriages[0].bundles[0].depthUm).toBeNull();
	});
});

describe('corrections of an implant', () => {
	async function made() {
		const { code } = await covered();
		await implants.create(surgeon, code, given());
		const view = await implants.get(observer, code, 'A');
		const { pitchUm, travelUm, backlashUm, smallestStepTurns, isClockwiseLowering } = view;
		const input = {
			surgeryDate: view.surgeryDay,
			surgeon: view.surgeon.id,
			massG: 19,
			...{ pitchUm, travelUm, backlashUm, smallestStepTurns, isClockwiseLowering },
			revision: 0
		};
		return { code, view, input };
	}

	it('are refused to observers, and for a letter the animal does not have', async () => {
		const { code, input } = await made();
		await expect(implants.edit(observer, code, 'A', input)).rejects.toThrow(Forbidden);
		await expect(implants.edit(surgeon, code, 'B', input)).rejects.toThrow(NotFound);
		await expect(implants.edit(surgeon, code, 'A', {})).rejects.toThrow(Invalid);
	});

	it('are kept once; the same form again is stale', async () => {
		const { code, view, input } = await made();
		const [{ id }] = view.sites[0].carriages[0].bundles;
		const bundles = [{ id, startDepthUm: 1000, entryApMm: -3.8, entryMlMm: 2.5 }];
		await implants.edit(surgeon, code, 'A', { ...input, bundles });
		const after = await implants.get(observer, code, 'A');
		expect(after.massG).toBe(19);
		expect(after.sites[0].carriages[0].bundles[0]).toMatchObject({
			depthUm: 1000,
			entryApMm: -3.8
		});
		await expect(implants.edit(surgeon, code, 'A', input)).rejects.toMatchObject({ code: 'stale' });
	});

	it('leave the screw alone once it was turned', async () => {
		const { code, view, input } = await made();
		await implants.edit(surgeon, code, 'A', { ...input, pitchUm: 300 });
		await makeTurn({
			carriageId: view.sites[0].carriages[0].id,
			doneAt: new Date('2026-03-02T10:00:00Z')
		});
		const later = { ...input, revision: 1 };
		await expect(implants.edit(surgeon, code, 'A', later)).rejects.toMatchObject({
			code: 'screw-in-use'
		});
		await expect(
			implants.edit(surgeon, code, 'A', { ...later, pitchUm: 300, surgeryDate: '2026-03-03' })
		).rejects.toMatchObject({ code: 'turned-before' });
		await expect(
			implants.withdraw(surgeon, code, 'A', { why: 'Entered twice' })
		).rejects.toMatchObject({ code: 'turned' });
	});

	it('date a change of role', async () => {
		const { code, view } = await made();
		const [{ id: bundleId }] = view.sites[0].carriages[0].bundles;
		const change = { bundleId, role: 'spare', from: '2026-03-05' };
		await expect(implants.changeRole(observer, code, 'A', change)).rejects.toThrow(Forbidden);
		await expect(
			implants.changeRole(surgeon, code, 'A', { ...change, from: '2026-02-01' })
		).rejects.toMatchObject({ issues: [{ field: 'from' }] });
		await implants.changeRole(surgeon, code, 'A', change);
		const after = await implants.get(observer, code, 'A');
		expect(after.sites[0].carriages[0].bundles[0].role).toBe('spare');
	});

	it('free the letter of an implant entered by mistake', async () => {
		const { code } = await made();
		await implants.withdraw(surgeon, code, 'A', { why: 'Wrong animal' });
		expect(await implants.list(observer, code)).toEqual([]);
		expect((await implants.create(surgeon, code, given())).letter).toBe('A');
	});
});
