import { beforeEach, describe, expect, it } from 'vitest';
import { QueryTypes } from 'sequelize';
import { z } from 'zod';
import { operation } from '$lib/schemas/api/operation';
import { now, setClock } from '$lib/server/clock';
import { db } from '$lib/server/db';
import { Conflict } from '$lib/server/errors';
import { endpoint } from '$lib/server/http/endpoint';
import { record } from '$lib/server/record';
import * as idempotencyKeys from '$lib/server/services/idempotency-keys';
import { call } from './call';
import { makeToken } from './token';

let done = 0;
let trouble: 'none' | 'refuse' | 'die-after-commit' = 'none';

/** Adds a log row per call: the smallest thing that is recorded. */
const post = endpoint(
	operation({
		id: 'post',
		method: 'POST',
		path: '/api/v1/notes',
		tag: 'test',
		summary: 'Notes',
		permission: 'animals.write',
		body: z.object({ note: z.string() }),
		status: 201,
		answer: z.object({ number: z.number(), note: z.string() })
	}),
	async ({ by, body }) => {
		if (trouble === 'refuse') throw new Conflict('busy', 'Not now');
		await record(by, async (w) => {
			await w.log('note.create', { kind: 'note', id: null });
			await new Promise((resolve) => setTimeout(resolve, 60));
		});
		done += 1;
		if (trouble === 'die-after-commit') throw new Error('power cut');
		return { number: done, note: body.note };
	}
);

const notes = async () =>
	Number(
		(
			await db().query<{ n: number }>(
				"SELECT count(*)::int AS n FROM log WHERE action = 'note.create'",
				{ type: QueryTypes.SELECT }
			)
		)[0].n
	);

let token: string;
let personId: string;
let before: number;

const send = (key: string, note = 'a', by = token) =>
	call(post, {
		method: 'POST',
		path: '/api/v1/notes',
		token: by,
		headers: { 'idempotency-key': key },
		body: { note }
	});

beforeEach(async () => {
	({ token, personId } = await makeToken());
	done = 0;
	trouble = 'none';
	before = await notes();
});

describe('Idempotency-Key', () => {
	it('records once and gives the same answer again', async () => {
		const first = await send('k1');
		const again = await send('k1');
		expect(again.status).toBe(201);
		expect(await again.json()).toEqual(await first.json());
		expect((await notes()) - before).toBe(1);
	});

	it('records once when the same call comes several times at one moment', async () => {
		const answers = await Promise.all(Array.from({ length: 5 }, () => send('k2')));
		const bodies = await Promise.all(answers.map((answer) => answer.text()));
		expect(new Set(answers.map(({ status }) => status))).toEqual(new Set([201]));
		expect(new Set(bodies).size).toBe(1);
		expect((await notes()) - before).toBe(1);
	});

	it('refuses the key for another request', async () => {
		await send('k3', 'a');
		const other = await send('k3', 'b');
		expect(other.status).toBe(409);
		expect(await other.json()).toMatchObject({ code: 'idempotency-mismatch' });
		expect((await notes()) - before).toBe(1);
	});

	it("does not mix one person's keys with another's", async () => {
		await send('k4');
		const { token: other } = await makeToken();
		await send('k4', 'b', other);
		expect((await notes()) - before).toBe(2);
	});

	it('lets a refused request be sent again once its cause is mended', async () => {
		trouble = 'refuse';
		expect((await send('k5')).status).toBe(409);
		trouble = 'none';
		expect((await send('k5')).status).toBe(201);
	});

	it('never records twice when the answer was lost after the commit', async () => {
		trouble = 'die-after-commit';
		expect((await send('k6')).status).toBe(500);
		trouble = 'none';
		const back = setClock(() => new Date(Date.now() + 10 * 60_000));
		const again = await send('k6');
		back();
		expect(again.status).toBe(409);
		expect(await again.json()).toMatchObject({ code: 'idempotency-answer-lost' });
		expect((await notes()) - before).toBe(1);
	});

	it('lets a claim of a process that died before its commit be taken over', async () => {
		const actor = {
			personId,
			name: 'x',
			roles: new Set(['experimenter'] as const),
			isBlinded: false,
			via: 'token' as const,
			scope: 'write' as const
		};
		const note = (w: Parameters<Parameters<typeof record>[1]>[0]) =>
			w.log('note.create', { kind: 'note', id: null });
		let later: Promise<unknown> | undefined;
		const slow = idempotencyKeys.once(actor, 'k7', 'h', async (by) => {
			const back = setClock(() => new Date(Date.now() + 10 * 60_000));
			later = idempotencyKeys.once(actor, 'k7', 'h', async (other) => {
				await record(other, note);
				return { status: 201, body: 'later' };
			});
			await later;
			back();
			await record(by, note);
			return { status: 201, body: 'first' };
		});
		await expect(slow).rejects.toMatchObject({ code: 'idempotency-in-progress' });
		await expect(later).resolves.toEqual({ status: 201, body: 'later' });
		expect((await notes()) - before).toBe(1);
	});

	it('forgets keys after a day', async () => {
		await send('k8');
		const back = setClock(() => new Date(Date.now() + 25 * 3_600_000));
		await send('k9');
		await send('k8');
		back();
		expect(now().getTime()).toBeLessThan(Date.now() + 1000);
		expect((await notes()) - before).toBe(3);
	});

	it.each(['', 'two words', 'x'.repeat(201)])('refuses the key "%s"', async (key) => {
		expect((await send(key)).status).toBe(400);
	});
});
