import { withProblems } from '$lib/server/http/problem';
import * as live from '$lib/server/services/live';
import type { RequestHandler } from './$types';

/** Something must pass now and then, or proxies take the line for dead. */
const BEAT_MS = 20_000;
/** After this the browser asks anew, and permission is asked anew. */
const LONGEST_MS = 10 * 60_000;

/** Server-sent events with the ids of analyses that changed; the page then reads what it may. */
export const GET: RequestHandler = ({ locals, params, request }) =>
	withProblems({ method: 'GET', route: 'session events' }, async () => {
		const encoder = new TextEncoder();
		let end = () => {};
		let controller: ReadableStreamDefaultController<Uint8Array> | undefined;
		const send = (text: string) => controller?.enqueue(encoder.encode(text));
		const stop = await live.listen(
			locals.actor,
			params.session,
			{ animal: params.code },
			(note) => {
				if (note === 'end') end();
				else if (note === 'again') send('event: again\ndata: again\n\n');
				else send(`event: analysis\ndata: ${note.id}\n\n`);
			}
		);
		const content = new ReadableStream<Uint8Array>({
			start(opened) {
				controller = opened;
				send('retry: 2000\n\n');
				const beat = setInterval(() => send(': still here\n\n'), BEAT_MS);
				const limit = setTimeout(() => end(), LONGEST_MS);
				end = () => {
					if (!controller) return;
					clearInterval(beat);
					clearTimeout(limit);
					stop();
					controller = undefined;
					opened.close();
				};
				request.signal.addEventListener('abort', () => end());
			},
			cancel: () => {
				const opened = controller;
				controller = undefined;
				if (opened) stop();
			}
		});
		return new Response(content, {
			headers: {
				'content-type': 'text/event-stream',
				'cache-control': 'no-store',
				'x-accel-buffering': 'no'
			}
		});
	});
