import { z } from 'zod';

/**
 * A moment, with its offset: "2026-04-09T14:05:00+02:00". A clock time without one would mean
 * something else on every device, so it is refused.
 */
export const momentSchema = z.union(
	[z.date(), z.iso.datetime({ offset: true, local: false }).transform((text) => new Date(text))],
	{ error: 'Give date, time and offset, like 2026-04-09T14:05:00+02:00.' }
);
