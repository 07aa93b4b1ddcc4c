import { page } from '$lib/server/http/answer';
import * as labSettings from '$lib/server/services/lab-settings';
import * as people from '$lib/server/services/people';
import type { LayoutServerLoad } from './$types';

/** Everything below is for people who are signed in; each page's own service still demands. */
export const load: LayoutServerLoad = (event) =>
	page(event, async () => {
		const { actor, theme } = event.locals;
		const [person, lab] = await Promise.all([people.self(actor), labSettings.get('lab')]);
		return {
			person,
			theme,
			isDemo: lab.isDemo,
			labName: lab.name,
			timeZone: lab.timeZone
		};
	});
