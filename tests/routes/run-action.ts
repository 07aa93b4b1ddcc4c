import type { RequestEvent } from '@sveltejs/kit';
import { pageEvent, type Visit } from './page-event';

type Handler = (event: never) => unknown;

/** What a load or an action answers to a visit, whether it returns it or throws it. */
export async function answerTo(handler: Handler | undefined, visit: Visit): Promise<unknown> {
	if (!handler) throw new Error('There is no such load or action');
	try {
		return await handler(pageEvent<RequestEvent>(visit) as never);
	} catch (thrown) {
		return thrown;
	}
}
