import { setTimeout as sleep } from 'node:timers/promises';
import { QueryTypes } from 'sequelize';
import { personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { db } from '$lib/server/db';
import { Conflict } from '$lib/server/errors';
import { CLAIMED, RECORDED } from '$lib/server/idempotent-call';

export interface Answered {
	status: number;
	body: unknown;
}

interface Row {
	requestHash: string;
	status: number;
	body: unknown;
	createdAt: Date;
}

const KEPT_H = 24;
/** A call that has shown no sign for so long has died with its process. */
const STALE_S = 120;
const WAIT_MS = 10_000;

/**
 * Does a script's call once per key, however often it is sent, at the same time or later.
 * The claim is marked in the transaction that records the work (see `record`), so a process that
 * dies in between leads neither to a second recording nor to a false "done".
 * @param work is given the actor to record by
 * @throws Conflict when the key was used for another request, or the first call is not answered yet
 */
export async function once(
	by: Actor,
	key: string,
	requestHash: string,
	work: (by: Actor) => Promise<Answered>
): Promise<Answered> {
	const personId = personOf(by);
	const until = performance.now() + WAIT_MS;
	for (;;) {
		const claimedAt = now();
		if (await claim(personId, key, requestHash, claimedAt)) {
			return await perform({ ...by, call: { key, claimedAt } }, personId, key, claimedAt, work);
		}
		const first = await find(personId, key);
		if (!first) continue;
		if (first.requestHash !== requestHash) {
			throw new Conflict(
				'idempotency-mismatch',
				'This Idempotency-Key was sent with another request. Nothing was recorded now. Use a new key for each new request.'
			);
		}
		if (first.status > RECORDED) return { status: first.status, body: first.body };
		if (now().getTime() - first.createdAt.getTime() > STALE_S * 1000) {
			if (first.status === RECORDED) throw answerLost();
			await release(personId, key, first.createdAt);
		} else if (performance.now() > until) {
			throw new Conflict(
				'idempotency-in-progress',
				'The first request with this Idempotency-Key is still being worked on. Send it again in a moment.'
			);
		} else {
			await sleep(50);
		}
	}
}

function answerLost(): Conflict {
	return new Conflict(
		'idempotency-answer-lost',
		'The first request with this Idempotency-Key was recorded, but its answer was lost. It was not recorded again. Read the list to see it.'
	);
}

async function perform(
	by: Actor,
	personId: string,
	key: string,
	claimedAt: Date,
	work: (by: Actor) => Promise<Answered>
): Promise<Answered> {
	try {
		const answered = await work(by);
		await db().query(
			`UPDATE idempotency_key SET status = $status, body = $body
			WHERE person_id = $personId AND key = $key AND created_at = $claimedAt`,
			{
				bind: {
					personId,
					key,
					claimedAt,
					status: answered.status,
					body: JSON.stringify(answered.body)
				}
			}
		);
		return answered;
	} catch (fault) {
		// Refused, so nothing was recorded: the same key may be tried again once the cause is mended.
		await release(personId, key, claimedAt);
		throw fault;
	}
}

async function claim(
	personId: string,
	key: string,
	requestHash: string,
	claimedAt: Date
): Promise<boolean> {
	await db().query('DELETE FROM idempotency_key WHERE created_at < $before', {
		bind: { before: new Date(claimedAt.getTime() - KEPT_H * 3_600_000) }
	});
	const made = await db().query(
		`INSERT INTO idempotency_key (person_id, key, request_hash, status, body, created_at)
		VALUES ($personId, $key, $requestHash, $status, 'null', $claimedAt)
		ON CONFLICT DO NOTHING RETURNING key`,
		{ bind: { personId, key, requestHash, claimedAt, status: CLAIMED }, type: QueryTypes.SELECT }
	);
	return made.length > 0;
}

async function find(personId: string, key: string): Promise<Row | undefined> {
	const [row] = await db().query<Row>(
		`SELECT request_hash AS "requestHash", status, body, created_at AS "createdAt"
		FROM idempotency_key WHERE person_id = $personId AND key = $key`,
		{ bind: { personId, key }, type: QueryTypes.SELECT }
	);
	return row;
}

/** Gives up a claim that recorded nothing; one that did stays, and its answer counts as lost. */
async function release(personId: string, key: string, claimedAt: Date): Promise<void> {
	await db().query(
		`DELETE FROM idempotency_key
		WHERE person_id = $personId AND key = $key AND created_at = $claimedAt AND status = $status`,
		{ bind: { personId, key, claimedAt, status: CLAIMED } }
	);
}
