import { requestAnalysis } from '$lib/schemas/api/analyses';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import * as analyses from '$lib/server/services/analyses';

export const POST = endpoint(
	requestAnalysis,
	({ by, params, body: { sorting, ...choices } }) =>
		analyses.request(by, params.id, choices, { sortingId: sorting }),
	({ id }) => ({ location: `/api/v1/analyses/${id}` })
);

export const fallback = onlyTakes('POST');
