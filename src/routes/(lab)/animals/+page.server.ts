import { may } from '$lib/server/access';
import { page } from '$lib/server/http/answer';
import * as animals from '$lib/server/services/animals';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		return { animals: await animals.list(actor), canWrite: may(actor, 'animals.write') };
	});
