import { afterAll, describe, expect, it } from 'vitest';
import { setClock } from '$lib/server/clock';
import { Unauthenticated } from '$lib/server/errors';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import * as today from '$lib/server/services/today';
import { makeActor } from '../../factories/actor';
import { makeAnalysis } from '../../factories/analysis';
import { makeAnimal } from '../../factories/animal';
import { makeDay } from '../../factories/day';
import { makeProtocol } from '../../factories/protocol';
import { makeSession } from '../../factories/session';
import { makeWeight } from '../../factories/weight';

const restore = setClock(() => new Date('2026-03-10T12:00:00Z'));
afterAll(restore);

async function restricted(restriction: 'food' | 'none') {
	const [animal, protocol] = await Promise.all([makeAnimal(), makeProtocol({ restriction })]);
	await AnimalProtocol.create({
		animalId: animal.id,
		protocolId: protocol.id,
		fromDay: '2026-03-01'
	});
	return animal;
}

async function sessionOn(date: string) {
	const day = await makeDay({ date });
	return makeSession({ dayId: day.id, startsAt: new Date(`${date}T10:00:00Z`) });
}

describe('today', () => {
	it('is for people who are signed in', async () => {
		await expect(today.view(null)).rejects.toThrow(Unauthenticated);
	});

	it('lists restricted animals that nobody has weighed since the lab day began', async () => {
		const [never, yesterday, weighed, free] = [
			await restricted('food'),
			await restricted('food'),
			await restricted('food'),
			await restricted('none')
		];
		const weigh = (animalId: string, at: string) =>
			makeWeight({ animalId, measuredAt: new Date(at) });
		// In the small hours the lab day before still goes on.
		await weigh(yesterday.id, '2026-03-10T01:00:00Z');
		await weigh(weighed.id, '2026-03-10T08:00:00Z');
		const { toWeigh } = await today.view(await makeActor('experimenter'));
		const of = (code: string) => toWeigh?.find((row) => row.code === code);
		expect(of(never.code)).toMatchObject({ lastDay: null, daysAgo: null });
		expect(of(yesterday.code)).toMatchObject({ lastDay: '2026-03-09', daysAgo: 1 });
		expect(of(weighed.code)).toBeUndefined();
		expect(of(free.code)).toBeUndefined();
	});

	it('tells what is of today from what was left unfinished', async () => {
		const [now, left, done, long] = [
			await sessionOn('2026-03-10'),
			await sessionOn('2026-03-08'),
			await sessionOn('2026-03-07'),
			await sessionOn('2026-01-02')
		];
		await makeAnalysis({ sessionId: left.id, state: 'running', progress: 0.5 });
		const failed = { code: 'x', message: 'Too few units.', canRetry: false };
		await makeAnalysis({ sessionId: done.id, state: 'failed', failure: failed });
		const view = await today.view(await makeActor('observer'));
		const ids = (rows: { id: string }[] | null) => rows?.map((row) => row.id);
		expect(ids(view.sessionsToday)).toEqual([now.id]);
		expect(ids(view.unfinished)).toEqual([left.id, done.id]);
		expect(view.unfinished?.[0]).toMatchObject({
			analysis: { state: 'running', progress: 0.5 },
			files: { position: 'taken-in' }
		});
		expect(view.unfinished?.[1].analysis?.failure).toBe('Too few units.');
		expect(ids(view.unfinished)).not.toContain(long.id);
	});

	it('shows each role its own part', async () => {
		const [admin, welfare, pi] = await Promise.all([
			today.view(await makeActor('admin')),
			today.view(await makeActor('welfare')),
			today.view(await makeActor('pi'))
		]);
		expect(admin).toMatchObject({ toWeigh: null, sessionsToday: null, invitations: [] });
		expect(welfare).toMatchObject({ toWeigh: null, sessionsToday: null, invitations: null });
		expect(pi.toWeigh).not.toBeNull();
		expect(pi.invitations).toEqual([]);
	});
});
