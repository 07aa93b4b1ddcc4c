import { z } from 'zod';
import { DAY_STATES, TALLY_MOMENTS, TALLY_SOURCES } from '../enumerations';
import { animalCodeSchema, dateAnswerSchema, momentSchema } from './fields';
import { operation } from './operation';

const params = z.object({ code: animalCodeSchema, date: z.iso.date() });

const figure = z.number().nullable();
const figures = {
	principal: figure,
	interneuron: figure,
	unclear: figure,
	multiUnit: figure,
	medianAmplitudeUv: figure,
	noiseUv: figure
};

export const daySchema = z
	.object({
		animal: z.string(),
		date: z.iso.date(),
		state: z.enum(DAY_STATES),
		entry: z.null().meta({ description: 'The text of a day comes with a later version.' }),
		tallies: z.array(
			z.object({
				bundle: z.string(),
				source: z.enum(TALLY_SOURCES),
				moment: z.enum(TALLY_MOMENTS),
				takenAt: dateAnswerSchema,
				...figures,
				person: z.string(),
				isEnteredLater: z.boolean()
			})
		)
	})
	.meta({ id: 'Day', description: 'Null is “nobody counted”; 0 is “counted, none there”.' });

const etag = { ETag: 'Changes whenever the day does; send it back as If-Match.' };

export const getDay = operation({
	id: 'getDay',
	method: 'GET',
	path: '/api/v1/animals/{code}/days/{date}',
	tag: 'Days',
	summary: 'One lab day of an animal',
	permission: 'data.read',
	params,
	status: 200,
	answer: daySchema,
	answerHeaders: etag
});

const tally = z.object({
	bundle: z.string().min(1).max(100),
	source: z.enum(TALLY_SOURCES).optional(),
	moment: z.enum(TALLY_MOMENTS).optional(),
	takenAt: momentSchema.optional(),
	principal: figure.optional(),
	interneuron: figure.optional(),
	unclear: figure.optional(),
	multiUnit: figure.optional(),
	medianAmplitudeUv: figure.optional(),
	noiseUv: figure.optional(),
	why: z.string().max(500).optional().meta({
		description: 'Needed where a count of this kind stands already and differs.'
	})
});

export const putDay = operation({
	id: 'putDay',
	method: 'PUT',
	path: '/api/v1/animals/{code}/days/{date}',
	tag: 'Days',
	summary: 'Enter the counts of a day',
	description:
		'All rows or none. A row that stands already changes nothing, so the call can be repeated; counts that are left out stay. A signed day takes no more counts.',
	permission: 'days.write',
	params,
	headers: z.object({
		'if-match': z.string().max(100).optional().meta({
			description: 'The ETag the change was made on; without it no check for others’ changes.'
		})
	}),
	body: z.strictObject({
		animal: z.string().optional(),
		date: z.iso.date().optional(),
		state: z.literal('draft', { error: 'A day is not signed by this call.' }).optional(),
		entry: z.null({ error: 'The text of a day comes with a later version.' }).optional(),
		tallies: z.array(tally).min(1).max(500)
	}),
	status: 200,
	answer: daySchema,
	answerHeaders: etag,
	refusals: {
		409: 'The day is signed, or another count stands and no `why` was given',
		412: 'The day was changed since If-Match was read; nothing was recorded'
	}
});
