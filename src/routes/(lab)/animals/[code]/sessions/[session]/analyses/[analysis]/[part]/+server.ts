import { Readable } from 'node:stream';
import { withProblems } from '$lib/server/http/problem';
import * as analyses from '$lib/server/services/analyses';
import type { RequestHandler } from './$types';

/** Arrays that figures are drawn from. A result never changes, so browsers keep them for good. */
export const GET: RequestHandler = ({ locals, params, request }) =>
	withProblems({ method: 'GET', route: 'analysis arrays' }, async () => {
		const { content, bytes, sha256 } = await analyses.arrays(
			locals.actor,
			params.analysis,
			params.part,
			{ session: params.session }
		);
		const headers = {
			etag: `"${sha256}-${params.part}"`,
			'cache-control': 'private, max-age=31536000, immutable'
		};
		if (request.headers.get('if-none-match') === headers.etag) {
			content.destroy();
			return new Response(null, { status: 304, headers });
		}
		return new Response(Readable.toWeb(content) as ReadableStream, {
			headers: {
				...headers,
				'content-type': 'application/octet-stream',
				'content-length': String(bytes)
			}
		});
	});
