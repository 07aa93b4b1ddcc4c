import { z } from 'zod';
import { page, press } from '$lib/server/http/answer';
import { parsed } from '$lib/server/parsed';
import * as tokens from '$lib/server/services/tokens';
import type { Actions, PageServerLoad } from './$types';

const revokeSchema = z.object({ id: z.uuid() });

export const load: PageServerLoad = (event) =>
	page(event, async () => ({ tokens: await tokens.listAll(event.locals.actor) }));

export const actions: Actions = {
	revokeToken: (event) =>
		press(event, async (sent) => {
			const { id } = parsed(revokeSchema, Object.fromEntries(sent));
			await tokens.revoke(event.locals.actor, id);
			return { done: 'The token is revoked. Scripts that use it are refused from now on.' };
		})
};
