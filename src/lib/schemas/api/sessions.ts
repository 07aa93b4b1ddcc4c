import { z } from 'zod';
import { epochSchema, rigSettingsSchema } from '../session';
import { textOf } from '../field-rules';
import { animalParams, momentSchema } from './fields';
import { operation } from './operation';

export const createSession = operation({
	id: 'createSession',
	method: 'POST',
	path: '/api/v1/animals/{code}/sessions',
	tag: 'Sessions',
	summary: 'Add a session: one run of the recorder',
	description:
		'Files are put to it next. Epoch times are seconds on the recorder’s clock, whose zero is `clockZeroAt`.',
	permission: 'sessions.write',
	params: animalParams,
	body: z.strictObject({
		startsAt: momentSchema,
		clockZeroAt: momentSchema.nullable().optional().meta({
			description: 'When the recorder’s clock showed zero; `startsAt` when left out.'
		}),
		day: z.iso.date().nullable().optional().meta({
			description: 'Lab day, when it is not the one the start falls on.'
		}),
		arena: z.string().max(2000).nullable().optional().meta({
			description: 'Name, id or description of an arena of the lab, like `straight:300`.'
		}),
		rig: z.string().max(120).nullable().optional().meta({ description: 'Name or id.' }),
		rigSettings: rigSettingsSchema
			.partial()
			.optional()
			.meta({ description: 'What is left out is copied from the rig.' }),
		note: textOf(4000),
		epochs: z.array(epochSchema).max(200).optional()
	}),
	status: 201,
	answer: z
		.object({
			id: z.uuid(),
			day: z.iso.date().meta({ description: 'The lab day the session was put on.' })
		})
		.meta({ id: 'CreatedSession' })
});
