import { NotFound } from '$lib/server/errors';
import { problem } from '$lib/server/http/problem';
import { settings } from '$lib/server/settings';

/** Addresses that no call has; a script gets problem details here too, not a page. */
export const fallback = () =>
	problem(
		new NotFound(
			`Quarterturn ${settings().version} has no such call. GET /api/v1/openapi.json lists those it has.`
		)
	);
