import { Readable } from 'node:stream';
import { withProblems } from '$lib/server/http/problem';
import * as dataFiles from '$lib/server/services/data-files';
import type { RequestHandler } from './$types';

/** The original of an upload, byte for byte. */
export const GET: RequestHandler = ({ locals, params }) =>
	withProblems({ method: 'GET', route: 'session file' }, async () => {
		const { name, bytes, content } = await dataFiles.original(locals.actor, params.file, {
			session: params.session
		});
		return new Response(Readable.toWeb(content) as ReadableStream, {
			headers: {
				// Never shown by the browser: what was uploaded is not ours to run.
				'content-type': 'application/octet-stream',
				'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(name)}`,
				'content-length': String(bytes),
				'cache-control': 'private, no-store'
			}
		});
	});
