import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resolve } from '$app/paths';
import { animalFactsSchema } from '$lib/schemas/animal';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { demand } from '$lib/server/access';
import { action, page, press } from '$lib/server/http/answer';
import { parsed } from '$lib/server/parsed';
import * as animals from '$lib/server/services/animals';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		demand(actor, 'animals.write');
		const animal = await animals.get(actor, event.params.code);
		return { code: animal.code, form: await superValidate(animal, zod4(animalFactsSchema)) };
	});

export const actions: Actions = {
	edit: (event) =>
		action(event, zod4(animalFactsSchema), async (facts) => {
			const { code } = await animals.edit(event.locals.actor, event.params.code, facts);
			redirect(303, resolve('/(lab)/animals/[code]', { code }));
		}),
	withdraw: (event) =>
		press(event, async (sent) => {
			const { why } = parsed(withdrawalSchema, Object.fromEntries(sent));
			await animals.withdraw(event.locals.actor, event.params.code, why);
			redirect(303, resolve('/(lab)/animals'));
		})
};
