import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resolve } from '$app/paths';
import { registers as descriptors } from '$lib/schemas/registers';
import { demand } from '$lib/server/access';
import { action, page } from '$lib/server/http/answer';
import * as registers from '$lib/server/services/registers';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const kind = event.params.register;
		demand(actor, 'registers.write');
		const { blank, schema } = descriptors[kind];
		const [form, choices] = await Promise.all([
			superValidate(zod4(schema)),
			registers.fieldChoices(actor, kind)
		]);
		// The library starts needed figures at 0; a blank one is not 0.
		return { kind, form: { ...form, data: { ...form.data, ...blank } }, choices };
	});

export const actions: Actions = {
	default: (event) => {
		const kind = event.params.register;
		return action(event, zod4(descriptors[kind].schema), async (values) => {
			await registers.create(event.locals.actor, kind, values);
			redirect(303, resolve('/(lab)/lab/[register=register]', { register: kind }));
		});
	}
};
