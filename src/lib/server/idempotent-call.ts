import { QueryTypes, type Transaction } from 'sequelize';
import type { Actor } from './access';
import { db } from './db';
import { Conflict } from './errors';

/** States of a key before its answer's HTTP status takes their place. */
export const CLAIMED = 0;
export const RECORDED = 1;

/** One call of a script that may be sent twice; `claimedAt` tells this try from a later one. */
export interface IdempotentCall {
	key: string;
	claimedAt: Date;
}

/**
 * Marks, in the transaction that records the work, that the actor's call was recorded.
 * @throws Conflict when another try took the call over meanwhile; then nothing is recorded here
 */
export async function markRecorded(by: Actor, t: Transaction): Promise<void> {
	if (!by.call) return;
	const marked = await db().query(
		`UPDATE idempotency_key SET status = ${RECORDED}
		WHERE person_id = $personId AND key = $key AND created_at = $claimedAt
			AND status IN (${CLAIMED}, ${RECORDED})
		RETURNING key`,
		{
			bind: { personId: by.personId, ...by.call },
			type: QueryTypes.SELECT,
			transaction: t
		}
	);
	if (marked.length === 0) {
		throw new Conflict(
			'idempotency-in-progress',
			'A later request with this Idempotency-Key took over. Nothing was recorded by this one.'
		);
	}
}
