import { withProblems } from '$lib/server/http/problem';
import * as analyses from '$lib/server/services/analyses';
import * as sessions from '$lib/server/services/sessions';
import type { RequestHandler } from './$types';

/** How far an analysis is, for pages that poll; with `?whole` the result as a file. */
export const GET: RequestHandler = ({ locals, params, url }) =>
	withProblems({ method: 'GET', route: 'session analysis' }, async () => {
		const { actor } = locals;
		await sessions.get(actor, params.session, { animal: params.code });
		const { result, ...standing } = await analyses.get(actor, params.analysis, {
			session: params.session
		});
		const headers = { 'cache-control': 'no-store' };
		if (!url.searchParams.has('whole')) return Response.json(standing, { headers });
		const name = `${params.code}-${standing.id}.json`;
		return new Response(JSON.stringify(result, null, 2), {
			headers: {
				...headers,
				'content-type': 'application/json',
				'content-disposition': `attachment; filename="${name}"`
			}
		});
	});
