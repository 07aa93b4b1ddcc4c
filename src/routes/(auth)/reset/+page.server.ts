import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resetRequestSchema } from '$lib/schemas/people';
import { action } from '$lib/server/http/answer';
import { originOf } from '$lib/server/http/origin';
import * as resets from '$lib/server/services/resets';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async () => ({
	form: await superValidate(zod4(resetRequestSchema))
});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(resetRequestSchema), async ({ email }) => {
			await resets.request(email, originOf(event));
			return { askedFor: email };
		})
};
