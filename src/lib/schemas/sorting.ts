import { z } from 'zod';
import { textOf } from './field-rules';

/** Who cut which sessions, with what. */
export const sortingInputSchema = z.object({
	sessions: z.array(z.uuid()).min(1, 'Name at least one session.').max(50),
	/** The one who sorted; whoever enters it unless named. */
	personId: z.uuid().nullable().default(null),
	program: textOf(120),
	programVersion: textOf(60),
	supersedes: z.uuid().nullable().default(null)
});

export type SortingInput = z.infer<typeof sortingInputSchema>;

export const sortingDetailSchema = sortingInputSchema.omit({ sessions: true });
export type SortingDetail = z.infer<typeof sortingDetailSchema>;
