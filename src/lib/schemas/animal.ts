import { z } from 'zod';
import { ANIMAL_STATUSES, SEXES, SPECIES, type AnimalStatus } from './enumerations';
import { figureOf, optionalDaySchema, revisionSchema, textOf } from './field-rules';

export const STATUS_WORDS: Record<AnimalStatus, string> = {
	expected: 'Expected',
	'in-lab': 'In the lab',
	ended: 'Ended'
};

/** R031, M012_b: what is written on the cage card, in upper or lower case. */
export const codeSchema = z
	.string()
	.trim()
	.regex(
		/^[A-Za-z0-9][A-Za-z0-9_]{0,23}$/,
		'A code has up to 24 letters, figures and underscores, and begins with a letter or figure: R031.'
	)
	.refine((code) => !['new', 'paste'].includes(code.toLowerCase()), {
		message: 'This word is the address of a page. Choose another code.'
	});

/** What is known of an animal itself. */
export const animalFactsSchema = z.object({
	code: codeSchema,
	species: z.enum(SPECIES, { error: `Choose one of ${SPECIES.join(', ')}.` }),
	strain: textOf(120),
	sex: z.enum(SEXES, { error: `Choose one of ${SEXES.join(', ')}.` }),
	birthDate: optionalDaySchema,
	source: textOf(120),
	status: z.enum(ANIMAL_STATUSES).default('in-lab'),
	baselineWeightG: figureOf(1, 5000, 'g').nullable().default(null),
	note: textOf(4000),
	revision: revisionSchema
});

/** A new animal may join a protocol (by number) and a project (by name) at once. */
export const newAnimalSchema = animalFactsSchema.extend({
	protocol: textOf(60),
	project: textOf(120),
	/** First day on both; today when left empty. */
	memberSince: optionalDaySchema
});

export type AnimalFacts = z.output<typeof animalFactsSchema>;
export type AnimalFactsInput = z.input<typeof animalFactsSchema>;
export type NewAnimalInput = z.input<typeof newAnimalSchema>;
export type NewAnimal = z.output<typeof newAnimalSchema>;

/** Joining a protocol or a project; `until` is the first day on which it no longer holds. */
export const joinSchema = z
	.object({
		id: z.uuid({ error: 'Choose one.' }),
		from: optionalDaySchema,
		until: optionalDaySchema
	})
	.refine(({ from, until }) => !from || !until || until >= from, {
		path: ['until'],
		message: 'The end lies before the beginning.'
	});

export type JoinInput = z.input<typeof joinSchema>;
