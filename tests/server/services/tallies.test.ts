import { beforeAll, describe, expect, it } from 'vitest';
import type { Actor } from '$lib/server/access';
import { Tally } from '$lib/server/models/tally';
import { Day } from '$lib/server/models/day';
import * as tallies from '$lib/server/services/tallies';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeDay } from '../../factories/day';
import { makeImplant } from '../../factories/implant';
import { holdLabAt } from './lab-of-tests';

const date = '2026-03-10';
let by: Actor & { personId: string };

async function rat() {
	const animal = await makeAnimal();
	await makeImplant({ animalId: animal.id, tetrodes: 3 });
	return animal;
}

beforeAll(async () => {
	await holdLabAt('2026-03-10T12:00:00Z');
	by = await makeActor('experimenter');
});

describe('counting units', () => {
	it('is refused to readers', async () => {
		const { code } = await rat();
		const rows = [{ bundle: 'T01', principal: 3 }];
		await expect(tallies.record(null, code, date, rows)).rejects.toMatchObject({ status: 401 });
		const observer = await makeActor('observer');
		await expect(tallies.record(observer, code, date, rows)).rejects.toMatchObject({ status: 403 });
		expect(await tallies.list(observer, code, date)).toEqual([]);
	});

	it('keeps 0 and blank apart', async () => {
		const { code } = await rat();
		const rows = await tallies.record(by, code, date, [
			{ bundle: 'T02', principal: 4, interneuron: null },
			{ bundle: 'T01', principal: 0, interneuron: 1 }
		]);
		expect(rows.map((row) => [row.bundle, row.principal, row.interneuron])).toEqual([
			['T01', 0, 1],
			['T02', 4, null]
		]);
		const blank = tallies.record(by, code, date, [{ bundle: 'T03', noiseUv: 20 }]);
		await expect(blank).rejects.toMatchObject({ issues: [{ field: '[0].principal' }] });
	});

	it('by eye and off a sorting stand side by side', async () => {
		const { code } = await rat();
		await tallies.record(by, code, date, [{ bundle: 'T01', principal: 4 }]);
		const rows = await tallies.record(by, code, date, [
			{ bundle: 'T01', principal: 6, source: 'sorting' }
		]);
		expect(rows.map(({ source, principal }) => [source, principal])).toEqual(
			expect.arrayContaining([
				['by-eye', 4],
				['sorting', 6]
			])
		);
	});

	it('again changes nothing when the same, and is replaced only with a reason', async () => {
		const { code } = await rat();
		const [first] = await tallies.record(by, code, date, [{ bundle: 'T01', principal: 4 }]);
		const [same] = await tallies.record(by, code, date, [{ bundle: 'T01', principal: 4 }]);
		expect(same.id).toBe(first.id);
		const other = { bundle: 'T01', principal: 5 };
		await expect(tallies.record(by, code, date, [other])).rejects.toMatchObject({
			code: 'already-counted'
		});
		const [now] = await tallies.record(by, code, date, [
			{ ...other, why: 'one more in the noise' }
		]);
		expect(now.principal).toBe(5);
		const before = await Tally.findByPk(first.id, { rejectOnEmpty: true });
		expect(before).toMatchObject({ principal: 4, withdrawnWhy: 'one more in the noise' });
	});

	it('is all or nothing', async () => {
		const { code } = await rat();
		const rows = [
			{ bundle: 'T01', principal: 4 },
			{ bundle: 'T99', principal: 4 }
		];
		await expect(tallies.record(by, code, date, rows)).rejects.toMatchObject({
			issues: [{ field: '[1].bundle' }]
		});
		expect(await tallies.list(by, code, date)).toEqual([]);
	});

	it('is not possible ahead of time, before surgery, or on a day it was not taken on', async () => {
		const { code } = await rat();
		const row = { bundle: 'T01', principal: 4 };
		const dateIssue = { issues: [{ field: 'date' }] };
		await expect(tallies.record(by, code, '2026-03-11', [row])).rejects.toMatchObject(dateIssue);
		await expect(tallies.record(by, code, '2026-02-20', [row])).rejects.toMatchObject(dateIssue);
		await expect(tallies.record(by, code, 'today', [row])).rejects.toMatchObject(dateIssue);
		const yesterday = { ...row, takenAt: '2026-03-10T03:00:00Z' };
		await expect(tallies.record(by, code, date, [yesterday])).rejects.toMatchObject({
			issues: [{ field: '[0].takenAt' }]
		});
	});

	it('of an earlier day needs its moment, and is marked as entered later', async () => {
		const { code } = await rat();
		const row = { bundle: 'T01', principal: 4 };
		await expect(tallies.record(by, code, '2026-03-05', [row])).rejects.toMatchObject({
			issues: [{ field: '[0].takenAt' }]
		});
		const timed = { ...row, takenAt: '2026-03-05T11:00:00Z' };
		const [entered] = await tallies.record(by, code, '2026-03-05', [timed]);
		expect(entered.isEnteredLater).toBe(true);
	});

	it('adds nothing to a signed day', async () => {
		const animal = await rat();
		const day = await makeDay({ animalId: animal.id, date });
		const [row] = await tallies.record(by, animal.code, date, [{ bundle: 'T01', principal: 4 }]);
		await day.update({ state: 'signed', responsibleId: by.personId });
		const more = tallies.record(by, animal.code, date, [{ bundle: 'T02', principal: 4 }]);
		await expect(more).rejects.toMatchObject({ code: 'day-signed' });
		await expect(tallies.withdraw(by, row.id, { why: 'no' })).rejects.toMatchObject({
			code: 'day-signed'
		});
	});

	it('at the same moment by two people makes one day', async () => {
		const animal = await rat();
		await Promise.all(
			['T01', 'T02', 'T03'].map((bundle) =>
				tallies.record(by, animal.code, date, [{ bundle, principal: 1 }])
			)
		);
		expect(await Day.count({ where: { animalId: animal.id } })).toBe(1);
		expect(await tallies.list(by, animal.code, date)).toHaveLength(3);
	});

	it('can be withdrawn with a reason, once', async () => {
		const { code } = await rat();
		const [{ id }] = await tallies.record(by, code, date, [{ bundle: 'T01', principal: 4 }]);
		await expect(tallies.withdraw(by, id, { why: ' ' })).rejects.toMatchObject({ status: 422 });
		await tallies.withdraw(by, id, { why: 'wrong animal' });
		expect(await tallies.list(by, code, date)).toEqual([]);
		await expect(tallies.withdraw(by, id, { why: 'again' })).rejects.toMatchObject({ status: 404 });
	});
});
