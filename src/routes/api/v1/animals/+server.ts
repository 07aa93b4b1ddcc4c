import { createAnimal, listAnimals } from '$lib/schemas/api/animals';
import { pageOf } from '$lib/server/http/cursor';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import * as animals from '$lib/server/services/animals';

export const GET = endpoint(listAnimals, async ({ by, query: { status, ...query } }) =>
	pageOf(await animals.list(by, { status }), ({ code }) => code, query)
);

export const POST = endpoint(
	createAnimal,
	async ({ by, body }) => {
		const { code } = await animals.create(by, body);
		return animals.get(by, code);
	},
	({ code }) => ({ location: `/api/v1/animals/${code}` })
);

export const fallback = onlyTakes('GET', 'POST');
