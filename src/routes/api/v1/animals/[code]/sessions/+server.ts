import { createSession } from '$lib/schemas/api/sessions';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import * as sessions from '$lib/server/services/sessions';

export const POST = endpoint(createSession, ({ by, params, body }) =>
	sessions.create(by, params.code, body)
);

export const fallback = onlyTakes('POST');
