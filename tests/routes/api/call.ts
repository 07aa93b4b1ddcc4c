import type { ApiEvent } from '$lib/server/http/api-event';

export interface Asked {
	method?: string;
	path?: string;
	params?: Record<string, string>;
	token?: string;
	headers?: Record<string, string>;
	/** Sent as JSON unless it is a string, bytes or a stream. */
	body?: unknown;
}

function isRaw(body: unknown): body is string | Uint8Array<ArrayBuffer> | ReadableStream {
	return typeof body === 'string' || body instanceof Uint8Array || body instanceof ReadableStream;
}

export function requestOf(asked: Asked): Request {
	const headers = new Headers(asked.headers);
	if (asked.token) headers.set('authorization', `Bearer ${asked.token}`);
	const init: RequestInit & { duplex?: 'half' } = { method: asked.method ?? 'GET', headers };
	if (asked.body !== undefined) {
		if (!headers.has('content-type')) headers.set('content-type', 'application/json');
		init.body = isRaw(asked.body) ? asked.body : JSON.stringify(asked.body);
		init.duplex = 'half';
	}
	return new Request(new URL(asked.path ?? '/', 'http://localhost'), init);
}

/** Calls a route's handler with what a script sends: no cookies, nobody signed in. */
export async function call(
	handler: (event: ApiEvent) => Response | Promise<Response>,
	asked: Asked = {}
): Promise<Response> {
	const request = requestOf(asked);
	return handler({ request, url: new URL(request.url), params: asked.params ?? {} });
}
