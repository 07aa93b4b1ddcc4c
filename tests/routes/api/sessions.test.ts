import { beforeAll, describe, expect, it } from 'vitest';
import { GET as analysis } from '../../../src/routes/api/v1/analyses/[id]/+server';
import { POST as session } from '../../../src/routes/api/v1/animals/[code]/sessions/+server';
import { POST as sorting } from '../../../src/routes/api/v1/animals/[code]/sortings/+server';
import { POST as analyse } from '../../../src/routes/api/v1/sessions/[id]/analyses/+server';
import { makeAnalysis } from '../../factories/analysis';
import { makeAnimal } from '../../factories/animal';
import { makeArena } from '../../factories/arena';
import { makeSession } from '../../factories/session';
import { call } from './call';
import { described } from './described';
import { makeToken } from './token';

const none = '0198c0de-0000-7000-8000-000000000000';
let code: string;
let token: string;
let arena: string;

beforeAll(async () => {
	({ code } = await makeAnimal());
	({ token } = await makeToken());
	({ name: arena } = await makeArena({ description: 'straight:123' }));
});

describe('POST /api/v1/animals/{code}/sessions', () => {
	const post = (body: object, animal = code) =>
		call(session, { method: 'POST', params: { code: animal }, token, body });
	const run = { name: 'run 1', kind: 'run', startS: 10, stopS: 600 };
	const startsAt = '2026-03-02T10:00:00+01:00';

	it('refuses an animal there is not', async () => {
		const answer = await post({ startsAt }, 'NONE');
		expect(answer.status).toBe(404);
		await described('createSession', answer);
	});

	it.each([
		['no start', {}, 'startsAt'],
		['a start without its offset', { startsAt: '2026-03-02T10:00:00' }, 'startsAt'],
		['an arena there is not', { startsAt, arena: 'moon' }, 'arena'],
		['a rig there is not', { startsAt, rig: 'moon' }, 'rig'],
		['a run epoch without an arena', { startsAt, epochs: [run] }, 'epochs[0].arena'],
		[
			'epochs that overlap',
			{
				startsAt,
				epochs: [
					{ ...run, kind: 'rest' },
					{ ...run, kind: 'rest', name: 'b', startS: 500 }
				]
			},
			'epochs[1].startS'
		],
		[
			'an epoch that ends before it starts',
			{ startsAt, epochs: [{ ...run, stopS: 5 }] },
			'epochs[0].stopS'
		]
	])('refuses %s', async (_, body, field) => {
		const answer = await post(body);
		expect(answer.status).toBe(422);
		expect((await described('createSession', answer)).issues[0].field).toBe(field);
	});

	it('adds a session in an arena by its name, on the lab day of its start', async () => {
		const answer = await post({ startsAt, arena, epochs: [run] });
		expect(answer.status).toBe(201);
		expect(await described('createSession', answer)).toMatchObject({ day: '2026-03-02' });
	});

	it('finds an arena by its description', async () => {
		const epochs = [{ ...run, arena: 'straight:123' }];
		expect((await post({ startsAt, arena: 'straight:123', epochs })).status).toBe(201);
	});
});

describe('POST /api/v1/animals/{code}/sortings', () => {
	const post = (animal: string, body: object) =>
		call(sorting, { method: 'POST', params: { code: animal }, token, body });

	it("refuses another animal's session", async () => {
		const { id } = await makeSession();
		const answer = await post(code, { sessions: [id] });
		expect(answer.status).toBe(422);
		expect((await described('createSorting', answer)).issues[0].field).toBe('sessions');
	});

	it('announces a sorting of another person', async () => {
		const animal = await makeAnimal();
		const { makeDay } = await import('../../factories/day');
		const { id } = await makeSession({ dayId: (await makeDay({ animalId: animal.id })).id });
		const { personId } = await makeToken();
		const answer = await post(animal.code, {
			sessions: [id],
			person: personId,
			program: 'by hand',
			supersedes: null
		});
		expect(answer.status).toBe(201);
		await described('createSorting', answer);
	});
});

describe('analyses', () => {
	const post = (id: string, body?: object) =>
		call(analyse, { method: 'POST', params: { id }, token, body });

	it('are refused for a session there is not', async () => {
		const answer = await post(none);
		expect(answer.status).toBe(404);
		await described('requestAnalysis', answer);
	});

	it('are refused for parameters out of bounds', async () => {
		const answer = await post(none, { binCm: 0, folds: 2.5, bins: 4 });
		expect(answer.status).toBe(422);
		const { issues } = await described('requestAnalysis', answer);
		expect(issues.map(({ field }: { field: string }) => field)).toEqual(['binCm', 'folds', '']);
	});

	it('are refused while the session lacks its data, saying what', async () => {
		const { id } = await makeSession();
		const answer = await post(id);
		expect(answer.status).toBe(409);
		expect(await described('requestAnalysis', answer)).toMatchObject({ code: 'inputs-missing' });
	});

	it('tell how far they are, to who reads data only', async () => {
		const { id, sessionId } = await makeAnalysis({
			setup: { arenaId: none, arenaName: 'x', epochs: [] }
		});
		const observer = await makeToken({ roles: ['observer'], scope: 'read' });
		const answer = await call(analysis, { params: { id }, token: observer.token });
		expect(await described('getAnalysis', answer)).toMatchObject({
			id,
			session: sessionId,
			state: 'queued',
			progress: 0,
			result: null
		});
	});

	it('are not found by a number that is none', async () => {
		for (const id of [none, 'one']) {
			const answer = await call(analysis, { params: { id }, token });
			expect(answer.status).toBe(404);
			await described('getAnalysis', answer);
		}
	});
});
