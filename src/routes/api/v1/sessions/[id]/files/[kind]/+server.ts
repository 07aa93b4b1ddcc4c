import { putSessionFile } from '$lib/schemas/api/files';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import { fileAnswer } from '$lib/server/http/file-answer';
import { sentFile } from '$lib/server/http/sent-file';
import * as takeIn from '$lib/server/services/take-in';

export const PUT = endpoint(putSessionFile, ({ by, request, params: { id, kind }, query }) =>
	sentFile(request, kind, async (file) =>
		fileAnswer(await takeIn.put(by, { sessionId: id, kind, ...file }, query))
	)
);

export const fallback = onlyTakes('PUT');
