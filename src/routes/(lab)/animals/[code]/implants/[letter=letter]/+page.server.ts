import { redirect } from '@sveltejs/kit';
import { resolve } from '$app/paths';
import { may } from '$lib/server/access';
import { page, press } from '$lib/server/http/answer';
import * as implants from '$lib/server/services/implants';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const { code, letter } = event.params;
		return {
			implant: await implants.get(actor, code, letter),
			canWrite: may(actor, 'implants.write')
		};
	});

export const actions: Actions = {
	role: (event) =>
		press(event, async (sent) => {
			const { code, letter } = event.params;
			await implants.changeRole(event.locals.actor, code, letter, Object.fromEntries(sent));
			return { done: 'The role is changed from that day on.' };
		}),
	withdraw: (event) =>
		press(event, async (sent) => {
			const { code, letter } = event.params;
			await implants.withdraw(event.locals.actor, code, letter, Object.fromEntries(sent));
			redirect(303, resolve('/(lab)/animals/[code]', { code }));
		})
};
