import { describe, expect, it } from 'vitest';
import * as exclusions from '$lib/server/services/exclusions';
import { makeActor } from '../../factories/actor';
import { makeDay } from '../../factories/day';
import { makeUnit } from '../../factories/unit';

const exclusion = { reason: 'unstable' as const, wasResultSeen: true };

describe('exclusions', () => {
	it('name one thing, its reason, and whether the result had been seen', async () => {
		const by = await makeActor('experimenter');
		const unit = await makeUnit();
		const { id } = await exclusions.add(by, { ...exclusion, unitId: unit.id });
		expect(await exclusions.list(by, 'unitId', [unit.id])).toMatchObject([
			{ id, of: 'unitId', subjectId: unit.id, wasResultSeen: true, person: by.name }
		]);
		const day = await makeDay();
		const both = { ...exclusion, unitId: unit.id, dayId: day.id };
		await expect(exclusions.add(by, both)).rejects.toMatchObject({ status: 422 });
		await expect(exclusions.add(by, exclusion)).rejects.toMatchObject({ status: 422 });
	});

	it('of a thing already left out, or not there, are refused', async () => {
		const by = await makeActor('experimenter');
		const dayId = (await makeDay()).id;
		await exclusions.add(by, { ...exclusion, dayId });
		await expect(exclusions.add(by, { ...exclusion, dayId })).rejects.toMatchObject({
			code: 'excluded-already'
		});
		const gone = { ...exclusion, dayId: '0196aa00-0000-7000-8000-000000000000' };
		await expect(exclusions.add(by, gone)).rejects.toMatchObject({ status: 404 });
	});

	it('for another reason say which', async () => {
		const by = await makeActor('experimenter');
		const other = { ...exclusion, reason: 'other' as const, dayId: (await makeDay()).id };
		await expect(exclusions.add(by, other)).rejects.toMatchObject({ issues: [{ field: 'note' }] });
		await exclusions.add(by, { ...other, note: 'fire alarm' });
	});

	it('are made and taken back by those who may', async () => {
		const [by, observer] = [await makeActor('pi'), await makeActor('observer')];
		const dayId = (await makeDay()).id;
		await expect(exclusions.add(observer, { ...exclusion, dayId })).rejects.toMatchObject({
			status: 403
		});
		const { id } = await exclusions.add(by, { ...exclusion, dayId });
		await expect(exclusions.withdraw(observer, id, { why: 'x' })).rejects.toMatchObject({
			status: 403
		});
		await exclusions.withdraw(by, id, { why: 'the cable was mended' });
		expect(await exclusions.list(observer, 'dayId', [dayId])).toEqual([]);
		await exclusions.add(by, { ...exclusion, dayId });
	});
});
