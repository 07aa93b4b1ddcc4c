import { isActionFailure, isHttpError, isRedirect } from '@sveltejs/kit';
import { beforeAll, describe, expect, it } from 'vitest';
import { db } from '$lib/server/db';
import { pageEvent } from './page-event';

type Handler = (event: object) => unknown;
interface PageModule {
	load?: Handler;
	actions?: Record<string, Handler>;
}
type EndpointModule = Partial<Record<string, Handler>>;

// Found, not listed: a page that somebody adds without a guard fails here.
const pages = import.meta.glob<PageModule>(
	['/src/routes/**/+page.server.ts', '/src/routes/**/+layout.server.ts'],
	{ eager: true }
);
const endpoints = import.meta.glob<EndpointModule>('/src/routes/**/+server.ts', { eager: true });

const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE', 'fallback'] as const;

/** Calls that say nothing of any lab, so a script may ask before it has a token. */
const OPEN_CALLS = ['/src/routes/api/v1/openapi.json/+server.ts'];

const below = (folder: string) => (path: string) => path.startsWith(folder);
const nameOf = (path: string) => path.replace('/src/routes/', '').replace(/\/\+[\w.]+$/, '');

const params: Record<string, string> = {
	code: 'R001',
	letter: 'A',
	register: 'arenas',
	id: '01890000-0000-7000-8000-000000000001',
	session: '01890000-0000-7000-8000-000000000001',
	date: '2026-04-09',
	kind: 'position'
};

const parent = { animal: { id: params.id, code: params.code } };

/** What a route answers, thrown or returned. */
async function answerOf(handler: Handler, event: object): Promise<unknown> {
	try {
		return await handler(event);
	} catch (thrown) {
		return thrown;
	}
}

beforeAll(() => db().authenticate());

const labPages = Object.entries(pages).filter(([path]) => below('/src/routes/(lab)')(path));
const loads = labPages.filter(([, module]) => module.load);
const actions = labPages.flatMap(([path, module]) =>
	Object.entries(module.actions ?? {}).map(([name, run]) => [path, name, run] as const)
);

describe('a stranger', () => {
	it('meets the routes that are there: the walk below walks something', () => {
		expect(loads.length).toBeGreaterThan(5);
		expect(actions.length).toBeGreaterThan(5);
		expect(labPages.map(([path]) => path)).toContain('/src/routes/(lab)/+layout.server.ts');
	});

	it.each(loads.map(([path, module]) => [nameOf(path), path, module] as const))(
		'who opens %s is led to sign-in',
		async (_, path, { load }) => {
			const event = pageEvent({ path: `/x?from=${encodeURIComponent(path)}`, params, parent });
			const answer = await answerOf(load ?? (() => null), event);
			expect(isRedirect(answer) && answer.location).toMatch(/^\/sign-in\?next=%2Fx/);
		}
	);

	it.each(actions.map(([path, name, run]) => [nameOf(path), name, run] as const))(
		'who posts to %s?/%s changes nothing',
		async (_path, _name, run) => {
			const answer = await answerOf(run, pageEvent({ params, form: { id: params.id } }));
			const isLedAway = isRedirect(answer) && answer.location.startsWith('/sign-in');
			const isRefused =
				(isActionFailure(answer) || isHttpError(answer)) &&
				answer.status >= 400 &&
				answer.status < 500;
			expect(isLedAway || isRefused).toBe(true);
		}
	);

	const labCalls = Object.entries(endpoints)
		.filter(([path]) => below('/src/routes/(lab)')(path) || below('/src/routes/uploads')(path))
		.flatMap(([path, module]) => METHODS.map((method) => [path, method, module[method]] as const))
		.filter(([, , run]) => run);

	it.each(labCalls.map(([path, method, run]) => [method, nameOf(path), run] as const))(
		'whose browser calls %s %s is refused',
		async (method, _, run) => {
			const event = pageEvent({ params, ...(method === 'GET' ? {} : { form: {} }) });
			const answer = await answerOf(run ?? (() => null), event);
			const status =
				answer instanceof Response || isHttpError(answer) || isRedirect(answer)
					? answer.status
					: answer;
			expect([303, 401, 403]).toContain(status);
			if (isRedirect(answer)) expect(answer.location).toMatch(/^\/sign-in/);
		}
	);
});

describe('a script without a token', () => {
	const calls = Object.entries(endpoints)
		.filter(([path]) => below('/src/routes/api/v1')(path) && !OPEN_CALLS.includes(path))
		.flatMap(([path, module]) => METHODS.map((method) => [path, method, module[method]] as const))
		// The fallback only tells which methods an address takes (405).
		.filter(([, method, run]) => run && method !== 'fallback');

	it
		.runIf(calls.length > 0)
		.each(calls.map(([path, method, run]) => [method, nameOf(path), run] as const))(
		'is answered 401 by %s %s',
		async (method, _, run) => {
			const event = pageEvent({ params, ...(method === 'GET' ? {} : { form: {} }) });
			const answer = await answerOf(run ?? (() => null), event);
			expect(answer).toBeInstanceOf(Response);
			if (!(answer instanceof Response)) return;
			expect(answer.status).toBe(401);
			expect(answer.headers.get('content-type')).toBe('application/problem+json');
			expect(answer.headers.get('www-authenticate')).toBe('Bearer');
		}
	);
});
