import { page } from '$lib/server/http/answer';
import * as today from '$lib/server/services/today';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => ({ today: await today.view(event.locals.actor) }));
