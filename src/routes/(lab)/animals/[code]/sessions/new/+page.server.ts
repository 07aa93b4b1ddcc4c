import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resolve } from '$app/paths';
import { sessionFormSchema } from '$lib/schemas/session-form';
import { demand } from '$lib/server/access';
import { action, page } from '$lib/server/http/answer';
import { labClock } from '$lib/server/services/lab-clock';
import * as animals from '$lib/server/services/animals';
import * as registers from '$lib/server/services/registers';
import * as sessions from '$lib/server/services/sessions';
import { besideRows, toInput } from '../session-form.server';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		demand(actor, 'sessions.write');
		const [animal, arenas, rigs] = await Promise.all([
			animals.get(actor, event.params.code),
			registers.choices(actor, 'arenas'),
			registers.choices(actor, 'rigs')
		]);
		return {
			code: animal.code,
			arenas,
			rigs,
			form: await superValidate(zod4(sessionFormSchema))
		};
	});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(sessionFormSchema), async (form) => {
			const { zone } = await labClock();
			const { id } = await besideRows(form, () =>
				sessions.create(event.locals.actor, event.params.code, toInput(form, zone))
			);
			const { code } = event.params;
			redirect(303, resolve('/(lab)/animals/[code]/sessions/[session]', { code, session: id }));
		})
};
