import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { firstSchema } from '$lib/schemas/people';
import { action, page } from '$lib/server/http/answer';
import { originOf } from '$lib/server/http/origin';
import { timeZones } from '$lib/server/lab-time';
import * as firstPerson from '$lib/server/services/first-person';
import * as labSettings from '$lib/server/services/lab-settings';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		await firstPerson.check(event.params.token, originOf(event));
		const { timeZone } = await labSettings.get('lab');
		const form = await superValidate({ timeZone }, zod4(firstSchema), { errors: false });
		return { form, timeZones: timeZones() };
	});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(firstSchema), async (data) => {
			const cookie = await firstPerson.accept(event.params.token, data, originOf(event));
			event.cookies.set(cookie.name, cookie.value, { path: '/', ...cookie.attributes });
			redirect(303, '/');
		})
};
