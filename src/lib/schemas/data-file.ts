import { z } from 'zod';
import { sortingDetailSchema } from './sorting';

/** How a person, or a program, says that a file is to be read. All may be left out. */
export const takeInSchema = z.object({
	decimal: z.enum(['.', ',']).optional(),
	/** Header of a column → field it holds; '' leaves the column out. */
	mapping: z.record(z.string(), z.string()).optional(),
	pxPerCm: z.number().positive('The scale is above zero.').max(100_000).optional(),
	labelsFileId: z.uuid().optional(),
	/** Of spikes: whose sorting it is. */
	sorting: sortingDetailSchema.partial().optional(),
	/** Of spikes: the sorting they belong to, when it was announced before. */
	sortingId: z.uuid().optional()
});

export type TakeIn = z.infer<typeof takeInSchema>;
