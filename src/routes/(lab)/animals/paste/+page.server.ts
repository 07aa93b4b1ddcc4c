import { redirect } from '@sveltejs/kit';
import { z } from 'zod';
import { resolve } from '$app/paths';
import { demand } from '$lib/server/access';
import { page, press } from '$lib/server/http/answer';
import { parsed } from '$lib/server/parsed';
import * as animals from '$lib/server/services/animals';
import type { Actions, PageServerLoad } from './$types';

const pasteSchema = z.object({
	text: z.string().max(500_000, 'Paste at most 500 kB at once.').default('')
});

export const load: PageServerLoad = (event) =>
	page(event, async () => demand(event.locals.actor, 'animals.write'));

export const actions: Actions = {
	preview: (event) =>
		press(event, async (sent) => {
			const { text } = parsed(pasteSchema, Object.fromEntries(sent));
			return { text, pasted: await animals.previewPaste(event.locals.actor, text) };
		}),
	save: (event) =>
		press(event, async (sent) => {
			const { text } = parsed(pasteSchema, Object.fromEntries(sent));
			await animals.paste(event.locals.actor, text);
			redirect(303, resolve('/(lab)/animals'));
		})
};
