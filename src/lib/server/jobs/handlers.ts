import { analyse } from './analyse';
import type { QueueData, QueueName } from './queues';
import { sendMail } from './send-mail';

/** What a handler knows of the worker that runs it. */
export interface JobContext {
	jobId: string;
	/** Number of the advisory lock that this worker holds while it lives. */
	lock: number;
	/** Analyses this worker is at, so that it can tell its own lost ones. */
	running: Set<string>;
	/** Aborted when the worker must stop and cannot wait any longer. */
	signal: AbortSignal;
}

type Handler<Q extends QueueName> = (data: QueueData<Q>, context: JobContext) => Promise<void>;

export const handlers: { [Q in QueueName]: Handler<Q> } = {
	analyse,
	'send-mail': sendMail
};
