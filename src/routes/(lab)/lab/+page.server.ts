import { demand, may } from '$lib/server/access';
import { page } from '$lib/server/http/answer';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		demand(actor, 'members.read');
		return {
			can: {
				registers: may(actor, 'registers.read'),
				tokens: may(actor, 'tokens.others'),
				mail: may(actor, 'mail.read'),
				jobs: may(actor, 'jobs.read'),
				log: may(actor, 'log.read')
			}
		};
	});
