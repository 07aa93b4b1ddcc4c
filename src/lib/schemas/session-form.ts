import { z } from 'zod';
import { EPOCH_KINDS } from './enumerations';
import { revisionSchema, textOf } from './field-rules';

const localMoment = z
	.string()
	.regex(/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2}(\.\d{1,3})?)?$/, 'Give date and time.');

/**
 * A session as its form sends it. The rows of the epochs table arrive as columns, one list a field,
 * which plain HTML forms can send without a script; rows left empty are not epochs.
 */
export const sessionFormSchema = z.object({
	startsAt: localMoment.default(''),
	clockZeroAt: localMoment.or(z.literal('')).default(''),
	day: z.string().default(''),
	arena: z.string().default(''),
	rig: z.string().default(''),
	reference: textOf(120),
	ground: textOf(120),
	filters: textOf(120),
	gain: textOf(120),
	headstageSerial: textOf(120),
	note: textOf(4000),
	epochName: z.string().array().default([]),
	epochKind: z.enum(EPOCH_KINDS).array().default([]),
	epochStartS: z.string().array().default([]),
	epochStopS: z.string().array().default([]),
	epochArena: z.string().array().default([]),
	epochConfiguration: z.string().array().default([]),
	revision: revisionSchema
});

export type SessionForm = z.infer<typeof sessionFormSchema>;
