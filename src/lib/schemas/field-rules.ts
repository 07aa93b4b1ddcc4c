import { z } from 'zod';

/** One line that must say something. */
export const lineOf = (most: number, message = 'Write something here.') =>
	z.string().trim().min(1, message).max(most, `At most ${most} characters.`);

/** A line or a text that may be left empty. */
export const textOf = (most: number) =>
	z.string().trim().max(most, `At most ${most} characters.`).default('');

/** A figure within bounds; the message names them, with the unit. */
export const figureOf = (least: number, most: number, unit = '') =>
	z
		.number({ error: `Give a number from ${least} to ${most}${unit && ` ${unit}`}.` })
		.min(least, `At least ${least}${unit && ` ${unit}`}.`)
		.max(most, `At most ${most}${unit && ` ${unit}`}.`);

/** A whole number within bounds; a fraction is refused rather than cut off. */
export const countOf = (least: number, most: number) =>
	figureOf(least, most).refine(Number.isInteger, 'Whole numbers only.');

/** A calendar day, "2026-04-09". */
export const daySchema = z.iso.date({ error: 'Give a day as year-month-day, like 2026-04-09.' });

/** A form's empty date field arrives as null. */
export const optionalDaySchema = daySchema.nullable().default(null);

/** Edits carry the revision they were made on, so that nobody overwrites what they did not see. */
export const revisionSchema = z.number().int().min(0).default(0);

/** Why something is taken out of use or left out. */
export const withdrawalSchema = z.object({
	why: lineOf(500, 'Say why; the reason stays with the record.')
});
