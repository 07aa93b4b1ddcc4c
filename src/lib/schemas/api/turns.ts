import { z } from 'zod';
import { animalParams, dateAnswerSchema, momentSchema } from './fields';
import { operation } from './operation';
import { listOf, pageQuerySchema } from './paging';

const entry = {
	id: z.uuid(),
	carriage: z.string(),
	doneAt: dateAnswerSchema,
	turns: z.number().meta({ description: 'Signed; plus lowers.' }),
	reason: z.string(),
	replaces: z.uuid().nullable(),
	isEnteredLater: z.boolean()
};

const standSchema = z
	.object({
		depthUm: z
			.number()
			.nullable()
			.meta({ description: 'Of the first bundle along its track; null when none is carried.' }),
		screwUm: z.number(),
		travelLeftUm: z.number(),
		bundles: z.array(z.object({ label: z.string(), depthUm: z.number() }))
	})
	.meta({ id: 'Stand', description: 'Where the carriage stands after a turn.' });

export const listTurns = operation({
	id: 'listTurns',
	method: 'GET',
	path: '/api/v1/animals/{code}/turns',
	tag: 'Turns',
	summary: 'Every turn ever entered, by the time it was done',
	description: 'Replaced rows stay in the list, without a stand.',
	permission: 'data.read',
	params: animalParams,
	query: pageQuerySchema.extend({
		carriage: z.string().max(100).optional().meta({ description: 'Of this carriage only.' })
	}),
	status: 200,
	answer: listOf(
		z
			.object({
				...entry,
				enteredAt: dateAnswerSchema,
				person: z.string(),
				replacedBy: z.uuid().nullable(),
				stand: standSchema.nullable()
			})
			.meta({ id: 'TurnInHistory' })
	)
});

export const recordTurn = operation({
	id: 'recordTurn',
	method: 'POST',
	path: '/api/v1/animals/{code}/turns',
	tag: 'Turns',
	summary: 'Enter a turn, or the correction of one',
	description:
		'The whole history of the carriage is checked again: a screw never stands outside its travel. `replaces` names the turn that a correction takes the place of; 0 turns voids it.',
	permission: 'turns.write',
	params: animalParams,
	body: z.strictObject({
		carriage: z.string().max(100).optional().meta({ description: 'Name, code or id.' }),
		doneAt: momentSchema.optional().meta({ description: 'Now when left out.' }),
		turns: z.number().min(-40).max(40).meta({ description: 'Signed; plus lowers.' }),
		reason: z.string().max(500).optional(),
		replaces: z.uuid().optional()
	}),
	status: 201,
	answer: z
		.object({
			...entry,
			...standSchema.shape,
			cautions: z.array(z.enum(['more-than-one-turn', 'reverses', 'little-travel-left']))
		})
		.meta({ id: 'Turn' })
});
