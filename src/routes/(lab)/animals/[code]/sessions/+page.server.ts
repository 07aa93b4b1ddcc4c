import { may } from '$lib/server/access';
import { page } from '$lib/server/http/answer';
import * as sessions from '$lib/server/services/sessions';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const { code } = event.params;
		const isWithWithdrawn = event.url.searchParams.has('withdrawn');
		return {
			code: code.toUpperCase(),
			sessions: await sessions.list(actor, { animal: code, isWithWithdrawn }),
			isWithWithdrawn,
			canWrite: may(actor, 'sessions.write')
		};
	});
