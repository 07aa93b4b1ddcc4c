import { superValidate } from 'sveltekit-superforms';
import { zod4 } from 'sveltekit-superforms/adapters';
import { labSettingsFormSchema } from '$lib/schemas/lab-settings';
import { demand, may } from '$lib/server/access';
import { action, page } from '$lib/server/http/answer';
import * as labSettings from '$lib/server/services/lab-settings';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		demand(actor, 'members.read');
		const { value, version, setAt } = await labSettings.current('lab');
		const { name, dayStartsAt } = value;
		return {
			lab: value,
			version,
			setAt,
			canChange: may(actor, 'lab-settings.write'),
			settingsForm: await superValidate({ name, dayStartsAt, version }, zod4(labSettingsFormSchema))
		};
	});

export const actions: Actions = {
	default: (event) =>
		action(event, zod4(labSettingsFormSchema), async (data) => {
			await labSettings.edit(event.locals.actor, data);
			return { done: 'The settings are saved. Days recorded before keep their dates.' };
		})
};
