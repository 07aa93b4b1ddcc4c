import { QueryTypes, UniqueConstraintError, DatabaseError, type Transaction } from 'sequelize';
import type { Actor } from './access';
import { now } from './clock';
import { db } from './db';
import { enqueue } from './jobs/enqueue';
import type { QueueData, QueueName } from './jobs/queues';
import { explainConstraint } from './constraints';
import { markRecorded } from './idempotent-call';

export interface Subject {
	kind: string;
	id: string | null;
}

/** What a write may do besides changing rows; all of it commits or none of it. */
export interface Write {
	t: Transaction;
	/** The row of the log; `action` is `noun.verb`, `detail` names what changed, never secrets. */
	log(action: string, subject: Subject, detail?: Record<string, unknown>): Promise<void>;
	enqueue<Q extends QueueName>(queue: Q, data: QueueData<Q>): Promise<void>;
}

/**
 * The only way to change the record: one transaction with its log row and its jobs.
 * The log is written last, because its chain makes other writers wait until this one commits.
 * @throws Conflict for a broken constraint, in words of the lab; Error when nothing was logged
 */
export async function record<T>(by: Actor, work: (w: Write) => Promise<T>): Promise<T> {
	try {
		return await db().transaction(async (t) => {
			const rows: { action: string; subject: Subject; detail: Record<string, unknown> }[] = [];
			const result = await work({
				t,
				log: async (action, subject, detail = {}) => {
					rows.push({ action, subject, detail });
				},
				enqueue: (queue, data) => enqueue(queue, data, t)
			});
			if (rows.length === 0) throw new Error('A write without a log row');
			await markRecorded(by, t);
			for (const row of rows) await append(by, row.action, row.subject, row.detail, t);
			return result;
		});
	} catch (cause) {
		if (cause instanceof UniqueConstraintError || cause instanceof DatabaseError) {
			throw explainConstraint(cause) ?? cause;
		}
		throw cause;
	}
}

async function append(
	by: Actor,
	action: string,
	subject: Subject,
	detail: Record<string, unknown>,
	t: Transaction
): Promise<void> {
	await db().query(
		`INSERT INTO log (at, person_id, via, action, subject_kind, subject_id, detail)
		VALUES ($at, $personId, $via, $action, $kind, $id, $detail)`,
		{
			bind: {
				at: now().toISOString(),
				personId: by.personId,
				via: by.via,
				action,
				kind: subject.kind,
				id: subject.id,
				detail: JSON.stringify(detail)
			},
			type: QueryTypes.INSERT,
			transaction: t
		}
	);
}
