import { error, json, redirect, type RequestEvent } from '@sveltejs/kit';
import { Invalid, Refusal, TooMany, Unauthenticated } from '$lib/server/errors';

/**
 * Turns a service's refusal into what a page answers: sign-in when nobody is signed in,
 * else the status with the refusal's own sentence. Bugs pass through to `handleError`.
 */
export async function page<T>(event: RequestEvent, work: () => Promise<T>): Promise<T> {
	try {
		return await work();
	} catch (fault) {
		if (fault instanceof Unauthenticated) redirect(303, signInAddress(event));
		if (fault instanceof Refusal) error(fault.status, fault.message);
		throw fault;
	}
}

export function signInAddress(event: RequestEvent): string {
	const back = event.request.method === 'GET' ? event.url.pathname + event.url.search : '/';
	return `/sign-in?next=${encodeURIComponent(back)}`;
}

/** The same for API routes: RFC 9457 problem details with a stable `code`. */
export async function api(work: () => Promise<Response>): Promise<Response> {
	try {
		return await work();
	} catch (fault) {
		if (fault instanceof Refusal) return problem(fault);
		throw fault;
	}
}

export function problem(refusal: Refusal): Response {
	const headers = new Headers({ 'content-type': 'application/problem+json' });
	if (refusal instanceof TooMany)
		headers.set('retry-after', String(Math.ceil(refusal.retryAfterS)));
	if (refusal instanceof Unauthenticated) headers.set('www-authenticate', 'Bearer');
	return json(
		{
			type: 'about:blank',
			title: refusal.name,
			status: refusal.status,
			code: refusal.code,
			detail: refusal.message,
			...(refusal instanceof Invalid && { issues: refusal.issues })
		},
		{ status: refusal.status, headers }
	);
}
