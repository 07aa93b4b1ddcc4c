import { readFile } from 'node:fs/promises';
import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import { forgetSettings, settings } from '$lib/server/settings';
import * as dataFiles from '$lib/server/services/data-files';
import { POST as sorting } from '../../../src/routes/api/v1/animals/[code]/sortings/+server';
import { PUT as file } from '../../../src/routes/api/v1/sessions/[id]/files/[kind]/+server';
import { PUT as spikesOfSorting } from '../../../src/routes/api/v1/sortings/[id]/files/spikes/+server';
import { makeActor } from '../../factories/actor';
import { makeBench, spikes, walk } from '../../server/data/lab';
import { call } from './call';
import { described } from './described';
import { makeToken } from './token';

const csv = { 'content-type': 'text/csv' };
let token: string;

beforeAll(async () => {
	({ token } = await makeToken());
});

afterEach(() => {
	delete process.env.UPLOAD_LIMIT_MB;
	forgetSettings();
});

const put = (
	id: string,
	kind: string,
	body: string | Uint8Array<ArrayBuffer> | ReadableStream,
	headers: Record<string, string> = csv,
	query = ''
) => call(file, { method: 'PUT', path: `/${query}`, token, params: { id, kind }, body, headers });

const kept = async (sessionId: string) => dataFiles.list(await makeActor('pi'), sessionId);

/** Files that a cut-off upload would leave aside. */
function leftAside(): string[] {
	const folder = join(settings().storageUrl, '.incoming');
	return readdirSync(folder, { recursive: true }).map(String);
}

/** Sends the beginning of a table and then ends in a fault, as a dropped connection does. */
function cutOff(): ReadableStream {
	let sent = 0;
	return new ReadableStream({
		pull(controller) {
			if (sent++ < 3) controller.enqueue(new TextEncoder().encode('t_s,x_cm\n0,1\n'));
			else controller.error(new Error('aborted'));
		}
	});
}

describe('PUT /api/v1/sessions/{id}/files/{kind}', () => {
	it('says 404 for a session there is not, and for a kind that this version does not take', async () => {
		const none = await put('0198c0de-0000-7000-8000-000000000000', 'position', walk());
		expect(none.status).toBe(404);
		await described('putSessionFile', none);
		const { sessionId } = await makeBench();
		const nwb = await put(sessionId, 'nwb', walk());
		expect(nwb.status).toBe(404);
		expect((await described('putSessionFile', nwb)).detail).toContain('position, spikes and units');
	});

	it.each([
		['another type', { 'content-type': 'application/json' }],
		['a form', { 'content-type': 'multipart/form-data; boundary=x' }]
	])('refuses %s', async (_, headers) => {
		const { sessionId } = await makeBench();
		const answer = await put(sessionId, 'position', walk(), headers);
		expect(answer.status).toBe(415);
		await described('putSessionFile', answer);
	});

	it('refuses a file with a wrong cell, naming row, column and reason, and takes nothing in', async () => {
		const { sessionId } = await makeBench();
		const answer = await put(sessionId, 'position', 't_s,x_cm\n0,1\n0.05,middle\n');
		expect(answer.status).toBe(422);
		const { file: place, detail, issues } = await described('putSessionFile', answer);
		expect(place).toEqual({ row: 3, column: 'x_cm' });
		expect(issues[0].field).toBe('x_cm');
		expect(detail).toMatch(/^Row 3, column x_cm: /);
		expect((await kept(sessionId)).map(({ state }) => state)).toEqual(['refused']);
	});

	it.each([
		['an empty file', ''],
		['an image', '\x89PNG\r\n\x1a\n'],
		['a table without its columns', 'a,b\n1,2\n']
	])('refuses %s', async (_, body) => {
		const { sessionId } = await makeBench();
		const answer = await put(sessionId, 'position', body);
		expect(answer.status).toBe(422);
		await described('putSessionFile', answer);
	});

	it('refuses a file over the limit, announced or not, and keeps nothing', async () => {
		const { sessionId } = await makeBench();
		process.env.UPLOAD_LIMIT_MB = '0.01';
		forgetSettings();
		const announced = { ...csv, 'content-length': '20000000' };
		for (const answer of [
			await put(sessionId, 'position', walk(), announced),
			await put(sessionId, 'position', walk())
		]) {
			expect(answer.status).toBe(413);
			expect((await described('putSessionFile', answer)).code).toBe('too-large');
		}
		expect(await kept(sessionId)).toEqual([]);
		expect(leftAside()).toEqual([]);
	});

	it('keeps nothing of an upload that was cut off', async () => {
		const { sessionId } = await makeBench();
		const answer = await put(sessionId, 'position', cutOff());
		expect((await described('putSessionFile', answer)).code).toBe('cut-off');
		expect(await kept(sessionId)).toEqual([]);
		expect(leftAside()).toEqual([]);
	});

	it('takes in positions and spikes, answering what was read', async () => {
		const { sessionId } = await makeBench();
		const named = { ...csv, 'content-disposition': 'attachment; filename="morning run.csv"' };
		const position = await put(sessionId, 'position', walk(), named);
		expect(position.status).toBe(200);
		expect(await described('putSessionFile', position)).toMatchObject({
			session: sessionId,
			kind: 'position',
			name: 'morning run.csv',
			format: 'csv',
			rows: 2400,
			columns: ['t_s', 'x_cm'],
			warnings: []
		});
		const tabs = spikes().replaceAll(',', '\t');
		const tsv = { 'content-type': 'text/tab-separated-values; charset=utf-8' };
		expect(
			await described('putSessionFile', await put(sessionId, 'spikes', tabs, tsv))
		).toMatchObject({
			kind: 'spikes',
			name: 'spikes.tsv',
			format: 'tsv'
		});
	});

	it('answers the same file when it is sent again, and refuses a second track', async () => {
		const { sessionId } = await makeBench();
		const first = await (await put(sessionId, 'position', walk())).json();
		expect(await (await put(sessionId, 'position', walk())).json()).toEqual(first);
		const other = await put(sessionId, 'position', walk(60));
		expect(other.status).toBe(409);
		expect((await described('putSessionFile', other)).code).toBe('position-present');
	});

	it('reads positions in pixels by the scale given', async () => {
		const { sessionId } = await makeBench('rectangle:100x80');
		const pixels = walk()
			.replace('t_s,x_cm', 't_s,x_px')
			.replaceAll(/,([\d.]+)\n/g, ',$1,20\n');
		const body = pixels.replace('x_px', 'x_px,y_px');
		expect((await put(sessionId, 'position', body)).status).toBe(422);
		expect((await put(sessionId, 'position', body, csv, '?pxPerCm=2')).status).toBe(200);
		const wrong = await put(sessionId, 'position', body, csv, '?pxPerCm=-2');
		expect(wrong.status).toBe(400);
		await described('putSessionFile', wrong);
	});

	it('takes the open recording from bytes without a name', async () => {
		const { sessionId } = await makeBench('straight:300');
		const bytes = await readFile('tests/fixtures/ca1-linear-track/position.csv');
		const raw = { 'content-type': 'application/octet-stream' };
		const answer = await put(sessionId, 'position', new Uint8Array(bytes), raw);
		expect(answer.status).toBe(200);
		expect((await described('putSessionFile', answer)).bytes).toBe(bytes.length);
	});
});

describe('PUT /api/v1/sortings/{id}/files/spikes', () => {
	const putSpikes = (id: string) =>
		call(spikesOfSorting, { method: 'PUT', token, params: { id }, body: spikes(), headers: csv });

	it('says 404 for a sorting there is not', async () => {
		const answer = await putSpikes('0198c0de-0000-7000-8000-000000000000');
		expect(answer.status).toBe(404);
		await described('putSortingFile', answer);
	});

	it('fills the sorting that was announced, once', async () => {
		const { animal, sessionId } = await makeBench();
		const announced = await call(sorting, {
			method: 'POST',
			token,
			params: { code: animal },
			body: { sessions: [sessionId], program: 'by hand' }
		});
		const { id } = await announced.json();
		const answer = await putSpikes(id);
		expect(answer.status).toBe(200);
		expect(await described('putSortingFile', answer)).toMatchObject({ session: sessionId });
		expect((await putSpikes(id)).status).toBe(200);
	});
});
