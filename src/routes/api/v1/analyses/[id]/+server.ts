import { getAnalysis } from '$lib/schemas/api/analyses';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import * as analyses from '$lib/server/services/analyses';

export const GET = endpoint(getAnalysis, async ({ by, params }) => {
	const { sessionId, sortingId, ...view } = await analyses.get(by, params.id);
	return { ...view, session: sessionId, sorting: sortingId };
});

export const fallback = onlyTakes('GET');
