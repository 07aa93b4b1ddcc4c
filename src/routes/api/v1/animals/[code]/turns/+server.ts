import { listTurns, recordTurn } from '$lib/schemas/api/turns';
import { pageOf } from '$lib/server/http/cursor';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import * as turns from '$lib/server/services/turns';

export const GET = endpoint(listTurns, async ({ by, params, query: { carriage, ...query } }) =>
	pageOf(
		await turns.history(by, params.code, { carriage }),
		({ doneAt, id }) => `${doneAt.toISOString()} ${id}`,
		query
	)
);

export const POST = endpoint(recordTurn, ({ by, params, body }) =>
	turns.record(by, params.code, body)
);

export const fallback = onlyTakes('GET', 'POST');
