import { describe, expect, it } from 'vitest';
import { ROLES } from '$lib/schemas/roles';
import { PERMISSIONS } from '$lib/server/access';
import type { Endpoint } from '$lib/server/http/endpoint';
import { call } from './call';
import { makeToken } from './token';

const routes = import.meta.glob<Record<string, Endpoint>>(
	'../../../src/routes/api/v1/**/+server.ts',
	{ eager: true }
);

const calls = Object.values(routes)
	.flatMap((exported) => Object.values(exported))
	.filter((handler) => handler.operation)
	.map((handler) => ({ handler, ...handler.operation }));

/** Nothing these name is there, and the body is none: who may call gets past the guard to that. */
const asked = (method: string, token?: string) => ({
	method,
	token,
	params: { code: 'NONE', id: '0198c0de-0000-7000-8000-000000000000', date: '2026-03-02' }
});

describe('every call of the API', () => {
	it('is found by this test', () => {
		expect(calls.length).toBeGreaterThan(10);
	});

	it.each(calls)('$method $path refuses a stranger', async ({ handler, method }) => {
		expect((await call(handler, asked(method))).status).toBe(401);
	});

	it.each(calls)(
		'$method $path refuses exactly the roles the permission table leaves out',
		async ({ handler, method, permission }) => {
			for (const role of ROLES) {
				const { token } = await makeToken({ roles: [role] });
				const { status } = await call(handler, asked(method, token));
				const isAllowed = PERMISSIONS[permission].some((allowed) => allowed === role);
				expect(status === 403, `${role}: ${status}`).toBe(!isAllowed);
			}
		}
	);

	it.each(calls.filter(({ method }) => method !== 'GET'))(
		'$method $path refuses a token that may read only',
		async ({ handler, method }) => {
			const { token } = await makeToken({ roles: ['pi', 'surgeon'], scope: 'read' });
			expect((await call(handler, asked(method, token))).status).toBe(403);
		}
	);

	it.each(calls.filter(({ method }) => method === 'GET'))(
		'$method $path answers a token that may read only',
		async ({ handler, method }) => {
			const { token } = await makeToken({ roles: ['pi'], scope: 'read' });
			expect([200, 404]).toContain((await call(handler, asked(method, token))).status);
		}
	);
});
