import type { Handle } from '@sveltejs/kit';
import { THEMES, type Theme } from '$lib/schemas/enumerations';

function isTheme(name: string | undefined): name is Theme {
	return THEMES.some((theme) => theme === name);
}

/** The theme belongs to the device: a tablet in the red room stays red whoever signs in. */
export const applyTheme: Handle = async ({ event, resolve }) => {
	const chosen = event.cookies.get('theme');
	const theme = isTheme(chosen) ? chosen : 'bench';
	event.locals.theme = theme;
	return resolve(event, {
		transformPageChunk: ({ html }) => html.replace('%qt.theme%', theme)
	});
};
