import { z } from 'zod';
import { EXCLUSION_REASONS } from './enumerations';
import { textOf } from './field-rules';

export const EXCLUDABLE = ['unitId', 'bundleId', 'sessionId', 'dayId'] as const;

const id = z.uuid('Not an id.').optional();

/** What is left out, and why. Whether its result had been seen is asked, because it matters later. */
export const exclusionSchema = z
	.object({
		unitId: id,
		bundleId: id,
		sessionId: id,
		dayId: id,
		reason: z.enum(EXCLUSION_REASONS, { error: 'Choose a reason from the list.' }),
		note: textOf(1000),
		wasResultSeen: z.boolean({ error: 'Say whether the result had been seen.' })
	})
	.refine((row) => EXCLUDABLE.filter((name) => row[name] !== undefined).length === 1, {
		message: 'An exclusion names one unit, one bundle, one session or one day.'
	})
	.refine((row) => row.reason !== 'other' || row.note !== '', {
		path: ['note'],
		message: 'Say what the other reason is.'
	});

export type ExclusionInput = z.input<typeof exclusionSchema>;
