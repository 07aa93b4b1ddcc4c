import { createSorting } from '$lib/schemas/api/sortings';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import * as sortings from '$lib/server/services/sortings';

export const POST = endpoint(createSorting, ({ by, params, body: { person, ...body } }) =>
	sortings.create(by, params.code, { ...body, personId: person })
);

export const fallback = onlyTakes('POST');
