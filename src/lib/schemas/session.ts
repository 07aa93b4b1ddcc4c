import { z } from 'zod';
import { EPOCH_KINDS } from './enumerations';
import { daySchema, lineOf, revisionSchema, textOf } from './field-rules';

/** Recorder clocks count seconds; a day has 86,400 and few recordings last two weeks. */
const LONGEST_S = 1_209_600;

const second = z
	.number({ error: 'Give seconds on the recorder’s clock.' })
	.min(-LONGEST_S, 'Too early for a recorder’s clock, in seconds.')
	.max(LONGEST_S, 'Too late for a recorder’s clock; give seconds.');

export const epochSchema = z
	.object({
		name: lineOf(60, 'Name the epoch.'),
		kind: z.enum(EPOCH_KINDS),
		startS: second,
		stopS: second,
		/** Id or name; a run epoch without one takes the session's. */
		arena: z.string().nullable().default(null),
		configuration: textOf(120)
	})
	.refine((epoch) => epoch.stopS > epoch.startS, {
		path: ['stopS'],
		message: 'The epoch must end after it starts.'
	});

export type EpochInput = z.infer<typeof epochSchema>;

/** Left out is another thing than empty: what is left out is copied from the rig. */
const setting = z.string().trim().max(120, 'At most 120 characters.').optional();

/** Settings of the rig as they were during the session. */
export const rigSettingsSchema = z.object({
	reference: setting,
	ground: setting,
	filters: setting,
	gain: setting,
	headstageSerial: setting
});

export type RigSettings = Required<z.infer<typeof rigSettingsSchema>>;

/** A session as services take it. Arena and rig by id or by name. */
export const sessionInputSchema = z.object({
	startsAt: z.coerce.date({ error: 'Say when the session started.' }),
	/** When the recorder's clock showed zero; the start of the session unless said. */
	clockZeroAt: z.coerce.date().nullable().default(null),
	/** Lab day, when it is not the one the start falls on. */
	day: daySchema.nullable().default(null),
	arena: z.string().nullable().default(null),
	rig: z.string().nullable().default(null),
	/** Left out, the rig's own settings are copied. */
	rigSettings: rigSettingsSchema.default({}),
	note: textOf(4000),
	epochs: z.array(epochSchema).max(200, 'At most 200 epochs.').default([])
});

export type SessionInput = z.infer<typeof sessionInputSchema>;

export const sessionEditSchema = sessionInputSchema.extend({ revision: revisionSchema });

export const reassignSchema = z.object({
	animal: lineOf(24, 'Give the code of the right animal.'),
	why: lineOf(500, 'Say why; the reason stays with the record.')
});
