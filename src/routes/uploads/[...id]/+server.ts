import { withProblems } from '$lib/server/http/problem';
import { resumable } from '$lib/server/http/resumable';
import type { RequestHandler } from './$types';

/** Uploads in pieces by the tus protocol; the service checks person, session and size. */
export const fallback: RequestHandler = ({ locals, request }) =>
	withProblems({ method: request.method, route: '/uploads' }, () =>
		resumable(locals.actor, request)
	);
