import { safePath } from '$lib/server/http/safe-path';
import { themes } from '$lib/components/ui/tokens';
import { redirect } from '@sveltejs/kit';
import { z } from 'zod';
import type { RequestHandler } from './$types';

const choice = z.object({ theme: z.enum(themes), to: z.string().nullish() });

const yearS = 365 * 24 * 60 * 60;

/** Keeps the theme of this device. Open to all: the sign-in page has themes too. */
export const POST: RequestHandler = async ({ request, cookies, url }) => {
	const parsed = choice.safeParse(Object.fromEntries(await request.formData()));
	if (!parsed.success) {
		return new Response('The theme is bench, evening or red. Nothing was changed.', {
			status: 400
		});
	}
	cookies.set('theme', parsed.data.theme, {
		path: '/',
		maxAge: yearS,
		sameSite: 'lax',
		// A lab's own server often has no certificate; a secure cookie would be dropped there.
		secure: url.protocol === 'https:'
	});
	if (request.headers.get('accept') === 'application/json') {
		return new Response(null, { status: 204 });
	}
	redirect(303, safePath(parsed.data.to ?? null, url.origin));
};
