import { putSortingFile } from '$lib/schemas/api/files';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import { fileAnswer } from '$lib/server/http/file-answer';
import { sentFile } from '$lib/server/http/sent-file';
import * as sortings from '$lib/server/services/sortings';
import * as takeIn from '$lib/server/services/take-in';

export const PUT = endpoint(putSortingFile, async ({ by, request, params: { id }, query }) => {
	const [sessionId] = await sortings.sessionsOf(by, id);
	const choice = { ...query, sortingId: id };
	return sentFile(request, 'spikes', async (file) =>
		fileAnswer(await takeIn.put(by, { sessionId, kind: 'spikes', ...file }, choice))
	);
});

export const fallback = onlyTakes('PUT');
