import { describe, expect, it } from 'vitest';
import type { Operation } from '$lib/schemas/api/operation';
import { operations } from '$lib/schemas/api/operations';
import { problemSchema } from '$lib/schemas/api/problem';
import { GET } from '../../../src/routes/api/v1/openapi.json/+server';
import { fallback as unknownAddress } from '../../../src/routes/api/[...rest]/+server';

type Route = Record<string, ((...given: never[]) => unknown) & { operation?: Operation }>;

const routes = Object.entries(
	import.meta.glob<Route>('../../../src/routes/api/v1/**/+server.ts', { eager: true })
).map(([file, exported]) => ({
	path: file
		.slice(file.indexOf('/api/'))
		.replace('/+server.ts', '')
		.replaceAll(/\[(\w+)(?:=\w+)?\]/g, '{$1}'),
	exported
}));

const ofRoutes = routes.filter(({ path }) => path !== '/api/v1/openapi.json');
const name = ({ method, path }: { method: string; path: string }) => `${method} ${path}`;

describe('the routes of the API', () => {
	it('have an operation for every method, under its own address', () => {
		const served = ofRoutes.flatMap(({ path, exported }) =>
			Object.entries(exported)
				.filter(([method]) => method !== 'fallback')
				.map(([method, handler]) => {
					expect(handler.operation && name(handler.operation)).toBe(name({ method, path }));
					return name({ method, path });
				})
		);
		expect(served.toSorted()).toEqual(operations.map(name).toSorted());
	});

	it.each(routes)('$path answers other methods with what it takes', async ({ exported }) => {
		const answer = exported.fallback();
		if (!(answer instanceof Response)) throw new Error('no answer');
		expect(answer.status).toBe(405);
		expect(answer.headers.get('content-type')).toBe('application/problem+json');
		const methods = Object.keys(exported).filter((method) => method !== 'fallback');
		expect(answer.headers.get('allow')?.split(', ').toSorted()).toEqual(methods.toSorted());
	});

	it('answer problem details for addresses that no call has, naming the version', async () => {
		const answer = unknownAddress();
		const { status, code, detail } = problemSchema.parse(await answer.json());
		expect({ status, code }).toEqual({ status: 404, code: 'not-found' });
		expect(detail).toContain('Quarterturn 0.1.0');
	});
});

describe('GET /api/v1/openapi.json', () => {
	it('is OpenAPI 3.1 and needs no token', async () => {
		const document = await GET().json();
		expect(document.openapi).toBe('3.1.0');
		expect(document.info.version).toBe('0.1.0');
		expect(document.security).toEqual([{ token: [] }]);
		expect(Object.keys(document.paths).toSorted()).toEqual(
			[...new Set(operations.map(({ path }) => path))].toSorted()
		);
	});

	it('leads nowhere that is not there', async () => {
		const document = await GET().json();
		const references = [
			...JSON.stringify(document).matchAll(/"\$ref":"#\/components\/schemas\/(\w+)"/g)
		];
		expect(references.length).toBeGreaterThan(20);
		for (const [, schema] of references) expect(document.components.schemas).toHaveProperty(schema);
	});

	it('gives each call a name of its own, its roles, and every parameter of its address', async () => {
		const document = await GET().json();
		const names = new Set<string>();
		for (const { path, method, permission } of operations) {
			const call = document.paths[path][method.toLowerCase()];
			names.add(call.operationId);
			expect(call.description, permission).toContain('Roles: ');
			const inPath = (call.parameters ?? [])
				.filter((parameter: { in: string }) => parameter.in === 'path')
				.map((parameter: { name: string }) => parameter.name);
			expect(inPath).toEqual([...path.matchAll(/\{(\w+)\}/g)].map(([, parameter]) => parameter));
		}
		expect(names.size).toBe(operations.length);
	});

	it('says nothing of calls that this version does not have', async () => {
		const paths = Object.keys((await GET().json()).paths).join(' ');
		for (const later of ['trend', 'advice', 'bookings', 'nwb']) expect(paths).not.toContain(later);
	});
});
