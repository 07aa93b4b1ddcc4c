import { describe, expect, it, beforeEach, afterEach } from 'vitest';
import { Readable } from 'node:stream';
import { isActionFailure } from '@sveltejs/kit';
import { startWorker, type Worker } from '$lib/server/jobs/worker';
import { unpackArrays } from '$lib/schemas/named-arrays';
import { forgetSettings } from '$lib/server/settings';
import * as analyses from '$lib/server/services/analyses';
import * as dataFiles from '$lib/server/services/data-files';
import { closeLive } from '$lib/server/services/live';
import { actions } from '../../src/routes/(lab)/animals/[code]/sessions/[session]/+page.server';
import { GET as getPart } from '../../src/routes/(lab)/animals/[code]/sessions/[session]/analyses/[analysis]/[part]/+server';
import { GET as getAnalysis } from '../../src/routes/(lab)/animals/[code]/sessions/[session]/analyses/[analysis]/+server';
import { GET as getEvents } from '../../src/routes/(lab)/animals/[code]/sessions/[session]/events/+server';
import { GET as getFile } from '../../src/routes/(lab)/animals/[code]/sessions/[session]/files/[file]/+server';
import { fallback as uploads } from '../../src/routes/uploads/[...id]/+server';
import { makeActor } from '../factories/actor';
import { ended, makeBench, send, spikes, walk, type Bench, type Person } from '../server/data/lab';
import { pageEvent } from './page-event';

let bench: Bench;

beforeEach(async () => {
	bench = await makeBench();
});

const base64 = (text: string) => Buffer.from(text).toString('base64');

interface Sent {
	method: string;
	path?: string;
	headers?: Record<string, string>;
	body?: Uint8Array<ArrayBuffer>;
}

/** One request of the tus protocol, as the browser's client makes it. */
async function tus(by: Person | null, { method, path = '', headers = {}, body }: Sent) {
	const event = pageEvent<Parameters<typeof uploads>[0]>({ path: `/uploads/${path}`, actor: by });
	const request = new Request(`http://localhost/uploads${path ? `/${path}` : ''}`, {
		method,
		headers: { 'tus-resumable': '1.0.0', ...headers },
		body
	});
	return uploads({ ...event, request });
}

async function create(by: Person | null, sessionId: string, bytes: number): Promise<Response> {
	return tus(by, {
		method: 'POST',
		headers: {
			'upload-length': String(bytes),
			'upload-metadata': `name ${base64('position.csv')},session ${base64(sessionId)},kind ${base64('position')}`
		}
	});
}

const idOf = (response: Response) => response.headers.get('location')?.split('/').at(-1) ?? '';

const piece = (by: Person, path: string, offset: number, body: Uint8Array<ArrayBuffer>) =>
	tus(by, {
		method: 'PATCH',
		path,
		headers: {
			'upload-offset': String(offset),
			'content-type': 'application/offset+octet-stream'
		},
		body
	});

describe('an upload in pieces', () => {
	const content = new TextEncoder().encode(walk());

	it('goes on where it stopped, and becomes a file when whole', async () => {
		const id = idOf(await create(bench.by, bench.sessionId, content.length));
		expect((await piece(bench.by, id, 0, content.slice(0, 10_000))).status).toBe(204);
		expect(await dataFiles.list(bench.by, bench.sessionId)).toEqual([]);
		const asked = await tus(bench.by, { method: 'HEAD', path: id });
		expect(asked.headers.get('upload-offset')).toBe('10000');
		const last = await piece(bench.by, id, 10_000, content.slice(10_000));
		expect(last.status).toBe(200);
		const [file] = await dataFiles.list(bench.by, bench.sessionId);
		expect(file).toMatchObject({ name: 'position.csv', kind: 'position', state: 'received' });
		expect(last.headers.get('quarterturn-file')).toBe(file.id);
		expect((await tus(bench.by, { method: 'HEAD', path: id })).status).toBe(404);
	});

	it('belongs to the person who began it', async () => {
		const id = idOf(await create(bench.by, bench.sessionId, content.length));
		const other = await makeActor('experimenter');
		expect((await tus(other, { method: 'HEAD', path: id })).status).toBe(404);
		expect((await piece(other, id, 0, content)).status).toBe(404);
		expect((await tus(other, { method: 'DELETE', path: id })).status).toBe(404);
	});

	it('can be cancelled and then leaves nothing', async () => {
		const id = idOf(await create(bench.by, bench.sessionId, content.length));
		await piece(bench.by, id, 0, content.slice(0, 10_000));
		expect((await tus(bench.by, { method: 'DELETE', path: id })).status).toBe(204);
		expect((await tus(bench.by, { method: 'HEAD', path: id })).status).toBe(404);
		expect(await dataFiles.list(bench.by, bench.sessionId)).toEqual([]);
	});

	it('is refused to strangers, observers and for no session', async () => {
		expect((await create(null, bench.sessionId, 10)).status).toBe(401);
		expect((await create(await makeActor('observer'), bench.sessionId, 10)).status).toBe(403);
		expect((await create(bench.by, crypto.randomUUID(), 10)).status).toBe(404);
	});

	describe('with the limit lowered', () => {
		beforeEach(() => {
			process.env.UPLOAD_LIMIT_MB = '0.01';
			forgetSettings();
		});

		afterEach(() => {
			delete process.env.UPLOAD_LIMIT_MB;
			forgetSettings();
		});

		it('is refused before a byte is sent', async () => {
			expect((await create(bench.by, bench.sessionId, content.length)).status).toBe(413);
		});
	});
});

/** The event of a plain form with files, as a browser without scripts sends it. */
function formEvent(by: Person, form: FormData) {
	const params = { code: bench.animal, session: bench.sessionId };
	const event = pageEvent<Parameters<NonNullable<typeof actions.upload>>[0]>({ actor: by, params });
	return { ...event, request: new Request('http://localhost/', { method: 'POST', body: form }) };
}

describe('a plain form with files', () => {
	it('is received without a script', async () => {
		const form = new FormData();
		form.set('kind', '');
		form.append('files', new File([walk()], 'a.csv'));
		form.append('files', new File([spikes()], 'b.csv'));
		expect(await actions.upload(formEvent(bench.by, form))).toHaveProperty('done');
		const files = await dataFiles.list(bench.by, bench.sessionId);
		// The files of one form are read side by side: whichever is done first stands first.
		expect(files.map(({ name, kind }) => [name, kind]).sort()).toEqual([
			['a.csv', 'position'],
			['b.csv', 'spikes']
		]);
	});

	it('without a file says so', async () => {
		const form = new FormData();
		form.append('files', new File([], ''));
		const answer = await actions.upload(formEvent(bench.by, form));
		expect(isActionFailure(answer) && answer.data).toEqual({ refusal: 'Choose a file first.' });
	});

	it('confirms what columns hold and takes the file in', async () => {
		const { id } = await dataFiles.receive(bench.by, {
			sessionId: bench.sessionId,
			name: 'odd.csv',
			content: Readable.from([Buffer.from(walk().replace('t_s,x_cm', 'when,where'))])
		});
		const form = new FormData();
		form.set('file', id);
		form.set('column-0', 't_s');
		form.set('column-1', 'x_mm');
		form.set('decimal', '.');
		await actions.takeIn(formEvent(bench.by, form));
		const file = await dataFiles.get(bench.by, id);
		expect(file).toMatchObject({ state: 'taken-in', kind: 'position' });
		expect(file.reading.chosen?.mapping).toEqual({ when: 't_s', where: 'x_mm' });
	});
});

describe('the original of a file', () => {
	it('comes back byte for byte, never as something the browser runs', async () => {
		const { id } = await send(bench, 'position', walk(), 'a "b".csv');
		const event = pageEvent<Parameters<typeof getFile>[0]>({
			actor: bench.by,
			params: { code: bench.animal, session: bench.sessionId, file: id }
		});
		const answer = await getFile(event);
		expect(await answer.text()).toBe(walk());
		expect(answer.headers.get('content-type')).toBe('application/octet-stream');
		expect(answer.headers.get('content-disposition')).toBe(
			"attachment; filename*=UTF-8''a%20%22b%22.csv"
		);
	});
});

describe('the arrays of a result', () => {
	let worker: Worker;
	let id: string;

	beforeEach(async () => {
		await send(bench, 'position', walk());
		await send(bench, 'spikes', spikes());
		[{ id }] = await analyses.list(bench.by, bench.sessionId);
		worker = await startWorker();
		await ended(bench.by, id);
	}, 60_000);

	afterEach(() => worker.stop());

	const partEvent = (part: string, by: Person | null = bench.by, headers = {}) => ({
		...pageEvent<Parameters<typeof getPart>[0]>({
			actor: by,
			params: { code: bench.animal, session: bench.sessionId, analysis: id, part }
		}),
		request: new Request('http://localhost/', { headers })
	});

	it('come in parts that browsers keep for good', async () => {
		const answer = await getPart(partEvent('path'));
		expect(answer.headers.get('cache-control')).toContain('immutable');
		const arrays = unpackArrays(await answer.arrayBuffer());
		expect(arrays.get('xCm')).toHaveLength(2400);
		const etag = answer.headers.get('etag') ?? '';
		expect((await getPart(partEvent('path', bench.by, { 'if-none-match': etag }))).status).toBe(
			304
		);
		expect((await getPart(partEvent('nonsense'))).status).toBe(404);
		expect((await getPart(partEvent('path', null))).status).toBe(401);
		expect((await getPart(partEvent('path', await makeActor('welfare')))).status).toBe(403);
	}, 60_000);

	it('come with the whole result as a file', async () => {
		const event = pageEvent<Parameters<typeof getAnalysis>[0]>({
			path: '/?whole',
			actor: bench.by,
			params: { code: bench.animal, session: bench.sessionId, analysis: id }
		});
		const answer = await getAnalysis(event);
		expect(answer.headers.get('content-disposition')).toContain('attachment');
		expect(await answer.json()).toMatchObject({ schema: 'quarterturn/session-analysis@1' });
	}, 60_000);
});

describe('live events of a session', () => {
	const listen = (by: Person | null) =>
		getEvents(
			pageEvent<Parameters<typeof getEvents>[0]>({
				actor: by,
				params: { code: bench.animal, session: bench.sessionId }
			})
		);

	it('are refused to who may not read it', async () => {
		expect((await listen(null)).status).toBe(401);
		expect((await listen(await makeActor('welfare'))).status).toBe(403);
	});

	it('name the analysis that changed and nothing else, until the server stops', async () => {
		const answer = await listen(bench.by);
		const reader = (answer.body ?? new ReadableStream()).getReader();
		let text = '';
		const until = async (wanted: string) => {
			while (!text.includes(wanted)) {
				const { done, value } = await reader.read();
				if (done) throw new Error(`ended before ${wanted}`);
				text += new TextDecoder().decode(value);
			}
		};
		await until('event: again');
		await send(bench, 'position', walk());
		await send(bench, 'spikes', spikes());
		const [{ id }] = await analyses.list(bench.by, bench.sessionId);
		await until(`event: analysis\ndata: ${id}\n\n`);
		closeLive();
		expect((await reader.read()).done).toBe(true);
	});
});
