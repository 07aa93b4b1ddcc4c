import type { Cookies, RequestEvent, ServerLoadEvent } from '@sveltejs/kit';
import type { Actor } from '$lib/server/access';

export interface Visit {
	path?: string;
	params?: Record<string, string>;
	actor?: Actor | null;
	sessionId?: string | null;
	/** Sent as a form by POST when given. */
	form?: Record<string, string>;
	address?: string;
	/** What the layouts above have loaded; a guard must not lean on it. */
	parent?: Record<string, unknown>;
}

/** A jar that remembers what a route sets. */
function jar(): Cookies & { held: Map<string, string> } {
	const held = new Map<string, string>();
	return {
		held,
		get: (name) => held.get(name),
		getAll: () => [...held].map(([name, value]) => ({ name, value })),
		set: (name, value) => void held.set(name, value),
		delete: (name) => void held.delete(name),
		serialize: () => ''
	};
}

/**
 * What Kit hands to a load, an action or an endpoint, for a visitor of the test's choice. Route
 * types differ by file; the parts they share are all that a guard looks at.
 */
export function pageEvent<E = RequestEvent & ServerLoadEvent>(visit: Visit = {}): E {
	const url = new URL(visit.path ?? '/', 'http://localhost');
	const request = visit.form
		? new Request(url, { method: 'POST', body: new URLSearchParams(visit.form) })
		: new Request(url);
	const event = {
		url,
		request,
		params: visit.params ?? {},
		cookies: jar(),
		locals: {
			actor: visit.actor ?? null,
			sessionId: visit.sessionId ?? null,
			theme: 'bench'
		},
		route: { id: null },
		isDataRequest: false,
		isSubRequest: false,
		isRemoteRequest: false,
		platform: undefined,
		getClientAddress: () => visit.address ?? '192.0.2.200',
		setHeaders: () => undefined,
		fetch: () => Promise.reject(new Error('A guard does not fetch')),
		depends: () => undefined,
		untrack: <T>(work: () => T) => work(),
		parent: () => Promise.resolve(visit.parent ?? {})
	};
	return event as unknown as E;
}
