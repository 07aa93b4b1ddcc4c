import { beforeAll, describe, expect, it } from 'vitest';
import type { Actor } from '$lib/server/access';
import * as turns from '$lib/server/services/turns';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeImplant } from '../../factories/implant';
import { ask } from '../invariants/catalogue';
import { holdLabAt } from './lab-of-tests';

let by: Actor & { personId: string };

async function rat(fields: Parameters<typeof makeImplant>[0] = {}) {
	const animal = await makeAnimal();
	const made = await makeImplant({ animalId: animal.id, tetrodes: 2, ...fields });
	return { code: animal.code, animalId: animal.id, ...made };
}

beforeAll(async () => {
	await holdLabAt('2026-03-10T12:00:00Z');
	by = await makeActor('experimenter');
});

describe('recording a turn', () => {
	it('is refused to those who only read, and to a token that reads only', async () => {
		const { code } = await rat();
		const input = { carriage: 'C01', turns: '1/4' };
		await expect(turns.record(null, code, input)).rejects.toMatchObject({ status: 401 });
		for (const role of ['observer', 'welfare', 'admin'] as const) {
			const reader = await makeActor(role);
			await expect(turns.record(reader, code, input)).rejects.toMatchObject({ status: 403 });
		}
		const token = { ...by, via: 'token' as const, scope: 'read' as const };
		await expect(turns.record(token, code, input)).rejects.toMatchObject({ status: 403 });
	});

	it('answers where screw, carriage and tip now stand', async () => {
		const { code, bundles } = await rat();
		await bundles[0].update({ startDepthUm: 900 });
		const down = await turns.record(by, code, {
			carriage: 'C01',
			turns: 2,
			doneAt: '2026-03-10T09:00:00Z'
		});
		expect(down).toMatchObject({
			screwUm: 635,
			carriageUm: 635,
			depthUm: 1535,
			travelLeftUm: 4365
		});
		const back = await turns.record(by, code, {
			carriage: 'C01',
			turns: '-1/4',
			doneAt: '2026-03-10T09:05:00Z'
		});
		expect(back).toMatchObject({ screwUm: 555.625, carriageUm: 595.625, depthUm: 1495.625 });
		expect(back.cautions).toEqual(['reverses']);
		expect(down.cautions).toEqual(['more-than-one-turn']);
	});

	it('is logged with who, where and how much', async () => {
		const { code } = await rat();
		const { id } = await turns.record(by, code, { carriage: 'c02', turns: '1/8', reason: 'quiet' });
		const [row] = await ask<{ action: string; person: string; detail: object }>(
			`SELECT action, person_id AS person, detail FROM log WHERE subject_id = '${id}'`
		);
		expect(row).toMatchObject({
			action: 'turn.record',
			person: by.personId,
			detail: { carriage: `${code}-C02`, turns: 0.125 }
		});
	});

	it('names the field that cannot be used', async () => {
		const { code } = await rat();
		const fieldOf = async (input: Parameters<typeof turns.record>[2]) => {
			const refusal = await turns.record(by, code, input).catch((fault: unknown) => fault);
			return refusal;
		};
		const at = (doneAt: string) => ({ carriage: 'C01', turns: 1, doneAt });
		expect(await fieldOf({ carriage: 'C99', turns: 1 })).toMatchObject({
			issues: [{ field: 'carriage' }]
		});
		expect(await fieldOf({ carriage: 'C01', turns: 'some' })).toMatchObject({
			issues: [{ field: 'turns' }]
		});
		expect(await fieldOf(at('2026-03-10T12:02:00Z'))).toMatchObject({
			issues: [{ field: 'doneAt' }]
		});
		expect(await fieldOf(at('2026-02-27T12:00:00Z'))).toMatchObject({
			issues: [{ field: 'doneAt' }]
		});
	});

	it('knows no carriage of another animal, and no animal that is not there', async () => {
		const [one, other] = [await rat(), await rat()];
		const input = { carriage: other.carriages[0].id, turns: 1 };
		await expect(turns.record(by, one.code, input)).rejects.toMatchObject({ status: 422 });
		await expect(turns.record(by, 'X999', input)).rejects.toMatchObject({ status: 404 });
	});

	it('refuses what passes the travel in words and records nothing', async () => {
		const { code } = await rat({ travelUm: 500 });
		const far = turns.record(by, code, { carriage: 'C01', turns: 2 });
		await expect(far).rejects.toMatchObject({ code: 'beyond-travel', status: 409 });
		expect(await turns.history(by, code)).toEqual([]);
	});

	it('marks what was entered on a later lab day', async () => {
		const { code } = await rat();
		const enter = (doneAt: string) =>
			turns.record(by, code, { carriage: 'C01', turns: 0.25, doneAt });
		expect(await enter('2026-03-10T03:00:00Z')).toMatchObject({ isEnteredLater: true });
		expect(await enter('2026-03-10T05:00:00Z')).toMatchObject({ isEnteredLater: false });
	});
});

describe('correcting a turn', () => {
	it('replaces the row at its own moment and keeps the old one readable', async () => {
		const { code } = await rat();
		const doneAt = '2026-03-09T09:00:00Z';
		const wrong = await turns.record(by, code, { carriage: 'C01', turns: 1, doneAt });
		const right = await turns.correct(by, code, wrong.id, { turns: '1/2', reason: 'misread' });
		expect(right).toMatchObject({ carriageUm: 158.75, replaces: wrong.id });
		expect(right.doneAt.toISOString()).toBe('2026-03-09T09:00:00.000Z');
		const [first, second] = await turns.history(by, code);
		expect(first).toMatchObject({
			id: wrong.id,
			replacedBy: right.id,
			stand: null,
			person: by.name
		});
		expect(second).toMatchObject({ id: right.id, stand: { carriageUm: 158.75 } });
	});

	it('to 0 voids it, and needs a reason', async () => {
		const { code } = await rat();
		const { id } = await turns.record(by, code, { carriage: 'C01', turns: 1 });
		await expect(turns.correct(by, code, id, { turns: 0 })).rejects.toMatchObject({
			issues: [{ field: 'reason' }]
		});
		await turns.correct(by, code, id, { turns: 0, reason: 'entered twice' });
		expect((await turns.position(by, code))[0]).toMatchObject({ carriageUm: 0, lastTurn: null });
		await expect(turns.correct(by, code, id, { turns: 1, reason: 'again' })).rejects.toMatchObject({
			code: 'already-corrected'
		});
	});

	it('is not possible for a turn of another animal', async () => {
		const [one, other] = [await rat(), await rat()];
		const { id } = await turns.record(by, one.code, { carriage: 'C01', turns: 1 });
		const fix = turns.correct(by, other.code, id, { turns: 0, reason: 'no' });
		await expect(fix).rejects.toMatchObject({ status: 404 });
	});
});

describe('positions', () => {
	it('are told for every carriage in the order of the screws, now and earlier', async () => {
		const { code } = await rat();
		await turns.record(by, code, { carriage: 'C01', turns: 1, doneAt: '2026-03-05T09:00:00Z' });
		await turns.record(by, code, { carriage: 'C01', turns: 1, doneAt: '2026-03-06T09:00:00Z' });
		const nowAt = await turns.position(by, code);
		expect(nowAt.map(({ carriage, screwUm }) => [carriage, screwUm])).toEqual([
			['C01', 635],
			['C02', 0]
		]);
		const earlier = await turns.position(by, code, { at: new Date('2026-03-05T20:00:00Z') });
		expect(earlier[0]).toMatchObject({ screwUm: 317.5, code: `${code}-C01` });
	});

	it('are hidden from welfare, who reads animals and not data', async () => {
		const { code } = await rat();
		const welfare = await makeActor('welfare');
		await expect(turns.position(welfare, code)).rejects.toMatchObject({ status: 403 });
		await expect(turns.history(welfare, code)).rejects.toMatchObject({ status: 403 });
	});
});
