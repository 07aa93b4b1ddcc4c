import { daySchema, getDay, putDay } from '$lib/schemas/api/days';
import { endpoint, onlyTakes } from '$lib/server/http/endpoint';
import { issuesUnder } from '$lib/server/http/issues-under';
import { PreconditionFailed } from '$lib/server/http/protocol-refusals';
import * as tallies from '$lib/server/services/tallies';
import { etagOf, readDay } from './read-day';

export const GET = endpoint(
	getDay,
	({ by, params }) => readDay(by, params),
	(day) => ({ etag: etagOf(day) })
);

export const PUT = endpoint(
	putDay,
	async ({ by, params, headers, body }) => {
		const expected = headers['if-match'];
		if (expected !== undefined) {
			const stands = etagOf(daySchema.parse(await readDay(by, params)));
			if (expected !== stands && expected !== '*') throw new PreconditionFailed('day');
		}
		await issuesUnder('tallies', () => tallies.record(by, params.code, params.date, body.tallies));
		return readDay(by, params);
	},
	(day) => ({ etag: etagOf(day) })
);

export const fallback = onlyTakes('GET', 'PUT');
