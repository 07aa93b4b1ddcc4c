import { z } from 'zod';

/**
 * Every kind of background work, with the shape of what it is told. Jobs carry ids only:
 * a worker reads the rows itself, so a job that waited an hour works on today's facts.
 */
export const queues = {
	analyse: z.object({ analysisId: z.uuid() }),
	'send-mail': z.object({ outboxId: z.uuid() })
} as const;

export type QueueName = keyof typeof queues;
export type QueueData<Q extends QueueName> = z.infer<(typeof queues)[Q]>;

const readers: { [Q in QueueName]: z.ZodType<QueueData<Q>> } = queues;

/** What a job carries, checked: a job may be older than the code that reads it. */
export function jobData<Q extends QueueName>(queue: Q, data: unknown): QueueData<Q> {
	return readers[queue].parse(data);
}

export const queueNames = Object.keys(queues) as QueueName[];

/** Retry and expiry rules; a job cut off by a killed worker is handed out again. */
export const queueOptions: Record<
	QueueName,
	{ retryLimit: number; retryDelay: number; retryBackoff: boolean; expireInSeconds: number }
> = {
	analyse: { retryLimit: 2, retryDelay: 2, retryBackoff: true, expireInSeconds: 3600 },
	'send-mail': { retryLimit: 8, retryDelay: 30, retryBackoff: true, expireInSeconds: 120 }
};
