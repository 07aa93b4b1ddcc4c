import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resolve } from '$app/paths';
import { sessionFormSchema } from '$lib/schemas/session-form';
import { demand } from '$lib/server/access';
import { action, page } from '$lib/server/http/answer';
import { labClock } from '$lib/server/services/lab-clock';
import * as registers from '$lib/server/services/registers';
import * as sessions from '$lib/server/services/sessions';
import { besideRows, toForm, toInput } from '../../session-form.server';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		demand(actor, 'sessions.write');
		const { code, session: id } = event.params;
		const [session, arenas, rigs, { zone }] = await Promise.all([
			sessions.get(actor, id, { animal: code }),
			registers.choices(actor, 'arenas'),
			registers.choices(actor, 'rigs'),
			labClock()
		]);
		return {
			session,
			arenas,
			rigs,
			form: await superValidate(toForm(session, zone), zod4(sessionFormSchema))
		};
	});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(sessionFormSchema), async (form) => {
			const { actor } = event.locals;
			const { code, session } = event.params;
			await sessions.get(actor, session, { animal: code });
			const { zone } = await labClock();
			await besideRows(form, () => sessions.edit(actor, session, toInput(form, zone)));
			redirect(303, resolve('/(lab)/animals/[code]/sessions/[session]', { code, session }));
		})
};
