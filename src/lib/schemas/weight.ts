import { z } from 'zod';
import { figureOf, textOf } from './field-rules';
import { momentSchema } from './moment';

/** A weighing as the scale shows it, implant and all. */
export const weightSchema = z.object({
	measuredAt: momentSchema.nullable().default(null),
	grossG: figureOf(1, 5000, 'g'),
	/** Left out: the sum of the implants the animal carries on that day. */
	implantMassG: figureOf(0, 500, 'g').nullable().default(null),
	note: textOf(500)
});

export type WeightInput = z.input<typeof weightSchema>;

/** The same as a form sends it: the moment on the lab's clock, now when left empty. */
export const weightFormSchema = weightSchema.omit({ implantMassG: true }).extend({
	measuredAt: z
		.string()
		.regex(/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2})?$/, 'Give date and time.')
		.nullable()
});
