import { setTimeout as wait } from 'node:timers/promises';

/**
 * Answers after the same time whatever the work found, as long as it takes less than that:
 * an answer that comes sooner for unknown addresses would tell who is a member.
 */
export async function steadily<T>(leastMs: number, work: () => Promise<T>): Promise<T> {
	const [done] = await Promise.allSettled([work(), wait(leastMs)]);
	if (done.status === 'rejected') throw done.reason;
	return done.value;
}
