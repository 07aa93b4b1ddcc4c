import { z } from 'zod';

/** RFC 9457 problem details, as every refusal of the API is written. */
export const problemSchema = z
	.object({
		type: z.literal('about:blank'),
		title: z.string(),
		status: z.int(),
		code: z.string().meta({ description: 'Stable for programs; the texts may be reworded.' }),
		detail: z.string(),
		issues: z
			.array(
				z.object({
					field: z.string().meta({ description: 'Path in the input, empty for all of it.' }),
					message: z.string()
				})
			)
			.optional(),
		file: z
			.object({
				row: z.int().nullable().meta({ description: 'Counted from 1; the header is row 1.' }),
				column: z.string().nullable()
			})
			.optional()
			.meta({ description: 'Where in a refused file.' }),
		id: z.string().optional().meta({ description: 'Fault number to tell whoever runs the server.' })
	})
	.meta({ id: 'Problem' });

export type ProblemDocument = z.output<typeof problemSchema>;
