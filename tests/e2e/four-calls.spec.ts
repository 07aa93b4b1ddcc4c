import { expect, test } from '@playwright/test';
import { TAG } from './names';
import { command, makeToken, run } from './shell';

const recording = (file: string) => `tests/fixtures/ca1-linear-track/${file}`;
const ARENA = 'straight:300';
const ANIMAL = `SHELL${TAG}`;

/** The result without what tells one run from another. */
function figuresOf(result: Record<string, unknown>) {
	const { startedAt: _at, elapsedS: _s, ...figures } = result;
	return figures;
}

test('four calls from a shell give the figures of the command line', async ({
	baseURL,
	request
}) => {
	test.setTimeout(180_000);
	const token = await makeToken('write');
	const made = await request.post('/api/v1/animals', {
		headers: { authorization: `Bearer ${token}` },
		data: { code: ANIMAL, species: 'rat', sex: 'unknown', note: 'Open recording, by script.' }
	});
	expect(made.status()).toBe(201);

	const answer = await run(['tests/e2e/four-calls.sh'], {
		LAB: baseURL,
		TOKEN: token,
		ANIMAL,
		SESSION: JSON.stringify({
			startsAt: '2026-03-02T10:00:00Z',
			arena: ARENA,
			epochs: [
				{ name: 'run', kind: 'run', startS: 4430, stopS: 5375 },
				{ name: 'rest', kind: 'rest', startS: 5390, stopS: 6365.27 }
			]
		}),
		POSITION: recording('linear.csv'),
		SPIKES: recording('spikes.csv')
	});
	const here = await run([
		...command('analyse', '--position', recording('linear.csv')),
		...['--spikes', recording('spikes.csv'), '--epochs', recording('epochs.csv')],
		...['--arena', ARENA, '--json', '-']
	]);
	expect(figuresOf(JSON.parse(answer).result)).toEqual(figuresOf(JSON.parse(here)));
});

test('a script that may not, or says nothing readable, gets problem details', async ({
	request
}) => {
	const stranger = await request.get('/api/v1/animals');
	expect(stranger.status()).toBe(401);
	expect(stranger.headers()['content-type']).toBe('application/problem+json');

	const reader = { authorization: `Bearer ${await makeToken('read')}` };
	const written = await request.post('/api/v1/animals', { headers: reader, data: {} });
	expect(written.status()).toBe(403);

	const unknown = await request.get('/api/v1/nothing');
	expect(unknown.status()).toBe(404);
	expect(await unknown.json()).toMatchObject({ code: 'not-found' });

	const wrongWay = await request.delete('/api/v1/animals', { headers: reader });
	expect(wrongWay.status()).toBe(405);
	expect(wrongWay.headers().allow).toBe('GET, POST');

	const document = await (await request.get('/api/v1/openapi.json')).json();
	expect(document.openapi).toBe('3.1.0');
});
