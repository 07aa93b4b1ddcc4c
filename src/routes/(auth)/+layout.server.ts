import * as labSettings from '$lib/server/services/lab-settings';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async ({ locals }) => {
	const lab = await labSettings.get('lab');
	return { labName: lab.name, isDemo: lab.isDemo, theme: locals.theme };
};
