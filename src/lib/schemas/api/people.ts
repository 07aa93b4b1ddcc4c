import { z } from 'zod';
import { operation } from './operation';
import { listOf, pageQuerySchema } from './paging';

export const listPeople = operation({
	id: 'listPeople',
	method: 'GET',
	path: '/api/v1/people',
	tag: 'People',
	summary: 'Active people of the lab',
	permission: 'members.read',
	query: pageQuerySchema,
	status: 200,
	answer: listOf(z.object({ id: z.uuid(), name: z.string() }).meta({ id: 'Person' }))
});
