import { listPeople } from '$lib/schemas/api/people';
import { pageOf } from '$lib/server/http/cursor';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import * as people from '$lib/server/services/people';

export const GET = endpoint(listPeople, async ({ by, query }) =>
	pageOf(await people.choices(by), ({ name, id }) => `${name} ${id}`, query)
);

export const fallback = onlyTakes('GET');
