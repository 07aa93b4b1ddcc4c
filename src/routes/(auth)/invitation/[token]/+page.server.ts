import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { acceptSchema } from '$lib/schemas/people';
import { action, page } from '$lib/server/http/answer';
import { originOf } from '$lib/server/http/origin';
import * as invitations from '$lib/server/services/invitations';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { email, name, roles } = await invitations.find(event.params.token, originOf(event));
		const form = await superValidate({ name }, zod4(acceptSchema), { errors: false });
		return { email, roles, form };
	});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(acceptSchema), async (data) => {
			const cookie = await invitations.accept(event.params.token, data, originOf(event));
			event.cookies.set(cookie.name, cookie.value, { path: '/', ...cookie.attributes });
			redirect(303, '/');
		})
};
