import { json } from '@sveltejs/kit';
import { demand, may } from '$lib/server/access';
import { page } from '$lib/server/http/answer';
import * as animals from '$lib/server/services/animals';
import type { RequestHandler } from './$types';
import type { FoundAnimal } from './found-animal';

/** What the palette can open besides pages; empty for people who may not read animals. */
export const GET: RequestHandler = (event) =>
	page(event, async () => {
		const { actor } = event.locals;
		demand(actor, 'own.read');
		const rows = may(actor, 'animals.read') ? await animals.list(actor) : [];
		const found: FoundAnimal[] = rows.map(({ code, species, strain, sex }) => ({
			code,
			detail: `${strain || species}, ${sex}`
		}));
		return json(found);
	});
