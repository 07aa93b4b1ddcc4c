import { z } from 'zod';
import { page } from '$lib/server/http/answer';
import * as labSettings from '$lib/server/services/lab-settings';
import * as log from '$lib/server/services/log';
import * as members from '$lib/server/services/members';
import { dayBounds } from '$lib/server/lab-time';
import type { PageServerLoad } from './$types';

/** A filter that cannot be read is left out rather than refused: it is an address, not a form. */
const filterSchema = z.object({
	person: z.uuid().optional().catch(undefined),
	kind: z.string().max(60).optional().catch(undefined),
	action: z
		.string()
		.regex(/^[a-z-]+(\.[a-z-]+)*$/)
		.optional()
		.catch(undefined),
	from: z.iso.date().optional().catch(undefined),
	to: z.iso.date().optional().catch(undefined),
	before: z.coerce.number().int().positive().optional().catch(undefined),
	check: z.literal('all').optional().catch(undefined)
});

/** As many as one page may check without making its reader wait. */
const CHECKED_AT_ONCE = 20_000;

const given = (params: URLSearchParams) =>
	Object.fromEntries([...params].filter(([, value]) => value !== ''));

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const filter = filterSchema.parse(given(event.url.searchParams));
		const { timeZone } = await labSettings.get('lab');
		const [rows, kinds, people, verdict] = await Promise.all([
			log.page(actor, {
				personId: filter.person,
				subjectKind: filter.kind,
				action: filter.action,
				from: filter.from ? dayBounds(filter.from, timeZone).start : undefined,
				to: filter.to ? dayBounds(filter.to, timeZone).end : undefined,
				before: filter.before
			}),
			log.kinds(actor),
			members.list(actor),
			log.verify(actor, filter.check ? undefined : CHECKED_AT_ONCE)
		]);
		const { before: _before, check: _check, ...shown } = filter;
		return {
			rows,
			kinds,
			people: people.map(({ id, name }) => ({ id, name })),
			verdict,
			filter: shown
		};
	});
