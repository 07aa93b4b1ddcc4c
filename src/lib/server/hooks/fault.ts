import type { HandleServerError } from '@sveltejs/kit';
import { logFault } from '$lib/server/fault-log';

/** What nobody foresaw is logged under an id; the page shows the id and a plain sentence. */
export const reportFault: HandleServerError = ({ error, event, status, message }) => {
	if (status < 500) {
		return { message: status === 404 ? 'There is no page at this address.' : message };
	}
	// The route, not the address: addresses of resets and invitations hold secrets.
	const id = logFault(error, {
		method: event.request.method,
		route: event.route.id,
		personId: event.locals.actor?.personId ?? null
	});
	return {
		message:
			'Something failed on the server. What was saved before is safe. Whether what you just sent was saved is not sure: look before you send it again.',
		id
	};
};
