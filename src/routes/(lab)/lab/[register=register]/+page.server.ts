import { may } from '$lib/server/access';
import { page } from '$lib/server/http/answer';
import * as registers from '$lib/server/services/registers';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const kind = event.params.register;
		const isWithWithdrawn = event.url.searchParams.has('withdrawn');
		return {
			kind,
			rows: await registers.list(actor, kind, { isWithWithdrawn }),
			isWithWithdrawn,
			canWrite: may(actor, 'registers.write')
		};
	});
