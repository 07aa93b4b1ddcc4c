import { z } from 'zod';
import { page, press } from '$lib/server/http/answer';
import { parsed } from '$lib/server/parsed';
import * as outbox from '$lib/server/services/outbox';
import type { Actions, PageServerLoad } from './$types';

const filterSchema = z.object({
	state: z.enum(['waiting', 'sent', 'dead']).optional().catch(undefined),
	before: z.uuid().optional().catch(undefined)
});
const retrySchema = z.object({ id: z.uuid() });

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const filter = filterSchema.parse(Object.fromEntries(event.url.searchParams));
		const mails = await outbox.list(event.locals.actor, filter);
		return { ...mails, state: filter.state ?? null };
	});

export const actions: Actions = {
	retry: (event) =>
		press(event, async (sent) => {
			const { id } = parsed(retrySchema, Object.fromEntries(sent));
			await outbox.retry(event.locals.actor, id);
			return { done: 'The mail is on its way again.' };
		})
};
