import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { passwordPairSchema } from '$lib/schemas/people';
import { action, page } from '$lib/server/http/answer';
import { originOf } from '$lib/server/http/origin';
import * as resets from '$lib/server/services/resets';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { name, email } = await resets.find(event.params.token, originOf(event));
		const form = await superValidate(zod4(passwordPairSchema));
		return { name, email, form };
	});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(passwordPairSchema), async (data) => {
			await resets.complete(event.params.token, data, originOf(event));
			redirect(303, '/sign-in?done=password-set');
		})
};
