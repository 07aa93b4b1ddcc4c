import { z } from 'zod';
import { page, press } from '$lib/server/http/answer';
import { parsed } from '$lib/server/parsed';
import * as analyses from '$lib/server/services/analyses';
import * as jobs from '$lib/server/services/jobs';
import type { Actions, PageServerLoad } from './$types';

const retrySchema = z.object({ analysis: z.uuid() });

export const load: PageServerLoad = (event) =>
	page(event, async () => ({ jobs: await jobs.list(event.locals.actor) }));

export const actions: Actions = {
	retry: (event) =>
		press(event, async (sent) => {
			const { analysis } = parsed(retrySchema, Object.fromEntries(sent));
			await analyses.retry(event.locals.actor, analysis);
			return { done: 'Tried again; it is in the queue.' };
		})
};
