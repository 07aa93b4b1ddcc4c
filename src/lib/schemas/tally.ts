import { z } from 'zod';
import { TALLY_MOMENTS, TALLY_SOURCES } from './enumerations';
import { lineOf } from './field-rules';
import { momentSchema } from './moment';

/** Null is "nobody counted", 0 is "counted, none there". */
const count = z
	.int({ error: 'Give a whole number, or leave it empty if nobody counted.' })
	.min(0, 'A count is 0 or more.')
	.max(200, 'More than 200 units on one bundle is no count.')
	.nullable()
	.default(null);

const microvolts = z
	.number({ error: 'Give a number in µV, or leave it empty.' })
	.min(0, 'An amplitude is 0 µV or more.')
	.max(20_000, 'At most 20 000 µV.')
	.nullable()
	.default(null);

export const TALLY_COUNTS = ['principal', 'interneuron', 'unclear', 'multiUnit'] as const;

export const tallySchema = z
	.object({
		bundle: lineOf(100, 'Say which bundle was counted.'),
		source: z.enum(TALLY_SOURCES).default('by-eye'),
		moment: z.enum(TALLY_MOMENTS).default('no-move'),
		takenAt: momentSchema.optional(),
		principal: count,
		interneuron: count,
		unclear: count,
		multiUnit: count,
		medianAmplitudeUv: microvolts,
		noiseUv: microvolts,
		/** Why a count that is there already is replaced. */
		why: z.string().trim().max(500, 'At most 500 characters.').default('')
	})
	.refine((tally) => TALLY_COUNTS.some((name) => tally[name] !== null), {
		path: ['principal'],
		message: 'Give at least one count, or leave the row out. 0 means that none was there.'
	});

export const talliesSchema = z.array(tallySchema).min(1, 'No row has a count.').max(500);

export type TallyInput = z.input<typeof tallySchema>;
export type TallyEntry = z.output<typeof tallySchema>;
