import type { Handle } from '@sveltejs/kit';
import { lucia } from '$lib/server/auth/lucia';
import * as signIns from '$lib/server/services/sign-ins';

/**
 * Tells once per request who acts. A call that shows a token is that token's alone: the API reads
 * it itself, and a bad one never falls back to the browser's cookie.
 */
export const readActor: Handle = async ({ event, resolve }) => {
	event.locals.actor = null;
	event.locals.sessionId = null;
	const sessionId = event.cookies.get(lucia().sessionCookieName);
	if (sessionId && !event.request.headers.has('authorization')) {
		const { actor, cookie } = await signIns.read(sessionId);
		if (actor) {
			event.locals.actor = actor;
			event.locals.sessionId = sessionId;
		}
		if (cookie) event.cookies.set(cookie.name, cookie.value, { path: '/', ...cookie.attributes });
	}
	return resolve(event);
};
