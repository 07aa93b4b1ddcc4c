import { z } from 'zod';

export const pageQuerySchema = z.object({
	limit: z.coerce
		.number()
		.int()
		.min(1)
		.max(500)
		.default(100)
		.meta({ description: 'Most items of one answer.' }),
	cursor: z
		.string()
		.max(500)
		.optional()
		.meta({ description: 'The `nextCursor` of the answer before; say nothing about its inside.' })
});

export type PageQuery = z.output<typeof pageQuerySchema>;

export const listOf = <T extends z.ZodType>(item: T) =>
	z.object({
		items: z.array(item),
		nextCursor: z.string().nullable().meta({ description: 'Null on the last page.' })
	});
