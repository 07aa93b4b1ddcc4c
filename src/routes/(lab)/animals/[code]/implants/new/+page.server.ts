import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resolve } from '$app/paths';
import { implantFormSchema, readImplantForm } from '$lib/schemas/implant-form';
import { demand } from '$lib/server/access';
import { Invalid } from '$lib/server/errors';
import { action, page } from '$lib/server/http/answer';
import * as implants from '$lib/server/services/implants';
import * as members from '$lib/server/services/members';
import * as registers from '$lib/server/services/registers';
import { toBlocks } from './blocks.server';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		demand(actor, 'implants.write');
		const [surgeons, designs, drives, form] = await Promise.all([
			members.surgeons(actor),
			registers.list(actor, 'drive-designs'),
			registers.list(actor, 'drives'),
			superValidate(zod4(implantFormSchema))
		]);
		return {
			form,
			surgeons: surgeons.map(({ id, name }) => ({ value: id, label: name })),
			designs: designs.map(({ values }) => ({
				value: String(values.name),
				label: `${values.name}, ${values.pitchUm} µm per turn, ${values.travelMm} mm`
			})),
			drives: drives
				.filter(({ values }) => !values.usedIn)
				.map(({ values }) => ({
					value: String(values.serial),
					label: `${values.serial}, ${values.designName}`
				}))
		};
	});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(implantFormSchema), async (form) => {
			const { code } = event.params;
			const { input, issues } = readImplantForm(form);
			if (issues.length > 0) throw new Invalid(issues);
			const { letter } = await toBlocks(form, () =>
				implants.create(event.locals.actor, code, input)
			);
			redirect(303, resolve('/(lab)/animals/[code]/implants/[letter=letter]', { code, letter }));
		})
};
