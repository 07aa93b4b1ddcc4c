import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resolve } from '$app/paths';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { registers as descriptors } from '$lib/schemas/registers';
import { may } from '$lib/server/access';
import { action, page, press } from '$lib/server/http/answer';
import { parsed } from '$lib/server/parsed';
import * as registers from '$lib/server/services/registers';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const { register: kind, id } = event.params;
		const [row, choices] = await Promise.all([
			registers.get(actor, kind, id),
			registers.fieldChoices(actor, kind)
		]);
		const values = { ...row.values, revision: row.revision };
		const form = await superValidate(values, zod4(descriptors[kind].schema), { errors: false });
		return { kind, row, form, choices, canWrite: may(actor, 'registers.write') };
	});

export const actions: Actions = {
	edit: (event) => {
		const { register, id } = event.params;
		return action(event, zod4(descriptors[register].schema), async (values) => {
			await registers.edit(event.locals.actor, register, id, values);
			redirect(303, resolve('/(lab)/lab/[register=register]', { register }));
		});
	},
	withdraw: (event) =>
		press(event, async (sent) => {
			const { register, id } = event.params;
			const { why } = parsed(withdrawalSchema, Object.fromEntries(sent));
			await registers.withdraw(event.locals.actor, register, id, why);
			return { done: 'Withdrawn. What refers to it keeps it; it is not offered any more.' };
		}),
	restore: (event) =>
		press(event, async () => {
			const { register, id } = event.params;
			await registers.restore(event.locals.actor, register, id);
			return { done: 'Back in use.' };
		})
};
