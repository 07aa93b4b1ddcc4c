import { beforeAll, describe, expect, it } from 'vitest';
import { systemActor } from '$lib/server/access';
import { record } from '$lib/server/record';
import * as days from '$lib/server/services/days';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { holdLabAt } from './lab-of-tests';

beforeAll(async () => {
	await holdLabAt('2026-03-10T12:00:00Z');
});

const opened = (animalId: string, date: string) =>
	record(systemActor(), async (w) => {
		const { id } = await days.open(w, animalId, date);
		await w.log('test.open', { kind: 'day', id });
		return id;
	});

describe('the days of an animal', () => {
	it('are made when something is first written, and found after that', async () => {
		const { id, code } = await makeAnimal();
		const by = await makeActor('observer');
		expect(await days.list(by, code)).toEqual([]);
		const first = await opened(id, '2026-03-02');
		expect(await opened(id, '2026-03-02')).toBe(first);
		await opened(id, '2026-03-01');
		expect((await days.list(by, code)).map(({ date }) => date)).toEqual([
			'2026-03-01',
			'2026-03-02'
		]);
		expect(await days.list(by, code, { from: '2026-03-02' })).toMatchObject([
			{ id: first, state: 'draft', responsibleId: null }
		]);
	});

	it('that nobody wrote on are not found', async () => {
		const { id, code } = await makeAnimal();
		const by = await makeActor('pi');
		await expect(days.get(by, code, '2026-03-02')).rejects.toMatchObject({ status: 404 });
		await opened(id, '2026-03-02');
		expect(await days.get(by, code.toLowerCase(), '2026-03-02')).toMatchObject({ state: 'draft' });
	});

	it('are hidden from those without data', async () => {
		const { code } = await makeAnimal();
		for (const role of ['welfare', 'admin'] as const) {
			const by = await makeActor(role);
			await expect(days.list(by, code)).rejects.toMatchObject({ status: 403 });
		}
	});
});
