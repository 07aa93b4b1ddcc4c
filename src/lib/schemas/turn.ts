import { z } from 'zod';
import { parseTurns } from '$lib/format/parse-turns';
import { lineOf } from './field-rules';
import { momentSchema } from './moment';

const UNREADABLE = 'Write turns as 1/4, -1/8, 1 1/2 or 0.5; minus turns back.';

/** Signed turns, written as people do or as a number; kept to five decimals. */
export const turnsSchema = z
	.union([z.number(), z.string()], { error: UNREADABLE })
	.transform((given, context) => {
		const turns = parseTurns(String(given));
		if (turns !== undefined) return turns;
		context.addIssue({ code: 'custom', message: UNREADABLE });
		return z.NEVER;
	})
	.refine((turns) => Math.abs(turns) <= 40, { message: 'More than 40 turns is no single entry.' });

/** One entry of the ledger. `replaces` makes it the correction of an earlier one; 0 voids that. */
export const turnSchema = z
	.object({
		carriage: lineOf(100, 'Say which carriage was turned.').optional(),
		doneAt: momentSchema.optional(),
		turns: turnsSchema,
		reason: z.string().trim().max(500, 'At most 500 characters.').default(''),
		replaces: z.uuid('Not the id of a turn.').optional()
	})
	.refine((turn) => turn.carriage !== undefined || turn.replaces !== undefined, {
		path: ['carriage'],
		message: 'Say which carriage was turned.'
	})
	.refine((turn) => turn.replaces === undefined || turn.reason !== '', {
		path: ['reason'],
		message: 'Say what was wrong; the reason stays with the correction.'
	});

export type TurnInput = z.input<typeof turnSchema>;
export type TurnEntry = z.output<typeof turnSchema>;
