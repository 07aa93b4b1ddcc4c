import type { RequestEvent } from '@sveltejs/kit';
import type { Origin } from '$lib/server/services/sign-ins';

export function originOf(event: RequestEvent): Origin {
	return {
		address: event.getClientAddress(),
		userAgent: event.request.headers.get('user-agent')
	};
}
