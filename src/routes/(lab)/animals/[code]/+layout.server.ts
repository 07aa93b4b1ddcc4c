import { page } from '$lib/server/http/answer';
import { toHeader } from '$lib/server/services/animal-views';
import * as animals from '$lib/server/services/animals';
import type { LayoutServerLoad } from './$types';

/** The head and the day strip that every page of an animal carries. */
export const load: LayoutServerLoad = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		const { code } = event.params;
		const [animal, strip] = await Promise.all([
			animals.get(actor, code),
			animals.strip(actor, code)
		]);
		return { animal, header: toHeader(animal), strip };
	});
