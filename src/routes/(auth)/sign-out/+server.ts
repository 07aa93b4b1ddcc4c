import { redirect } from '@sveltejs/kit';
import * as signIns from '$lib/server/services/sign-ins';
import type { RequestHandler } from './$types';

/** Only by POST: an address alone (a link, an image) never signs anybody out. */
export const POST: RequestHandler = async ({ locals, cookies }) => {
	if (locals.actor && locals.sessionId) {
		const cookie = await signIns.signOut(locals.actor, locals.sessionId);
		cookies.set(cookie.name, cookie.value, { path: '/', ...cookie.attributes });
	}
	redirect(303, '/sign-in?done=signed-out');
};
