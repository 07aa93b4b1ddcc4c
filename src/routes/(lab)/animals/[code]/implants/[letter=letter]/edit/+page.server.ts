import { redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { resolve } from '$app/paths';
import {
	implantEditFormSchema,
	PLACING_COLUMNS,
	toImplantEdit
} from '$lib/schemas/implant-edit-form';
import { demand } from '$lib/server/access';
import { action, page } from '$lib/server/http/answer';
import * as implants from '$lib/server/services/implants';
import * as members from '$lib/server/services/members';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const { code, letter } = event.params;
		demand(actor, 'implants.write');
		const implant = await implants.get(actor, code, letter);
		const surgeons = await members.surgeons(actor, implant.surgeon.id);
		const bundles = implant.sites
			.flatMap((site) => site.carriages)
			.flatMap((carriage) => carriage.bundles);
		const columns = PLACING_COLUMNS.map((name) => [
			name,
			bundles.map((bundle) => String(bundle[name] ?? ''))
		]);
		const values = {
			...implant,
			surgeryDate: implant.surgeryDay,
			surgeon: implant.surgeon.id,
			siteId: implant.sites.map(({ id }) => id),
			siteLayer: implant.sites.map(({ targetLayer }) => targetLayer),
			bundleId: bundles.map(({ id }) => id),
			...Object.fromEntries(columns)
		};
		return {
			form: await superValidate(values, zod4(implantEditFormSchema), { errors: false }),
			sites: implant.sites.map(({ label }) => label),
			bundles: bundles.map((bundle) => bundle.code),
			letter: implant.letter,
			surgeons: surgeons.map(({ id, name }) => ({ value: id, label: name }))
		};
	});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(implantEditFormSchema), async (form) => {
			const { code, letter } = event.params;
			await implants.edit(event.locals.actor, code, letter, toImplantEdit(form));
			redirect(303, resolve('/(lab)/animals/[code]/implants/[letter=letter]', { code, letter }));
		})
};
