import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resolve } from '$app/paths';
import { newAnimalSchema } from '$lib/schemas/animal';
import { demand } from '$lib/server/access';
import { action, page } from '$lib/server/http/answer';
import * as animals from '$lib/server/services/animals';
import * as registers from '$lib/server/services/registers';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		demand(actor, 'animals.write');
		const [form, protocols, projects] = await Promise.all([
			superValidate(zod4(newAnimalSchema)),
			registers.list(actor, 'protocols'),
			registers.list(actor, 'projects')
		]);
		return {
			form,
			protocols: protocols
				.filter((row) => !row.values.isExpired)
				.map(({ values }) => ({
					value: String(values.number),
					label: `${values.number}, ${values.animalsLeft} animals left`
				})),
			projects: projects.map(({ values }) => String(values.name))
		};
	});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(newAnimalSchema), async (animal) => {
			const { code } = await animals.create(event.locals.actor, animal);
			redirect(303, resolve('/(lab)/animals/[code]', { code }));
		})
};
