import { text, type Handle } from '@sveltejs/kit';
import { settings } from '$lib/server/settings';

const READS = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Refuses a change that another site's page sends with the reader's cookie. Kit's own check knows
 * one address fixed when the application is built; a lab is opened as localhost, 127.0.0.1 and
 * by its name in turn, so the browser's Origin is compared with the Host it asked, or with ORIGIN.
 * Calls of the API are left alone: they prove themselves by a token and ignore cookies.
 */
export const refuseForeignForms: Handle = async ({ event, resolve }) => {
	const { request, url } = event;
	if (READS.has(request.method) || url.pathname.startsWith('/api/')) return resolve(event);
	if (isOurs(request.headers.get('origin'), request.headers.get('host'))) return resolve(event);
	return text(
		'This form was sent from another site, so nothing was changed. Open the page here and send it again.',
		{ status: 403 }
	);
};

/** Whether a page of this application sent a request; one without an origin was not sent by a page. */
export function isOurs(origin: string | null, host: string | null): boolean {
	if (!origin || !URL.canParse(origin)) return false;
	return origin === settings().origin || new URL(origin).host === host;
}
