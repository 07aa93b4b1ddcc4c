import { z } from 'zod';
import { sortingInputSchema } from '../sorting';
import { animalParams } from './fields';
import { operation } from './operation';

export const createSorting = operation({
	id: 'createSorting',
	method: 'POST',
	path: '/api/v1/animals/{code}/sortings',
	tag: 'Sortings',
	summary: 'Announce a sorting: one person’s cut of sessions of a day',
	description: 'Its spikes are put to it next. A sorting adds to the record, it replaces nothing.',
	permission: 'sessions.write',
	params: animalParams,
	body: z.strictObject({
		...sortingInputSchema.omit({ personId: true }).shape,
		person: z.uuid().nullable().optional().meta({
			description: 'Who sorted, as an id of the people; the token’s owner when left out.'
		})
	}),
	status: 201,
	answer: z.object({ id: z.uuid() }).meta({ id: 'CreatedSorting' })
});
