import { z } from 'zod';
import { newAnimalSchema } from '../animal';
import { ANIMAL_STATUSES, SEXES, SPECIES } from '../enumerations';
import { animalParams, momentAnswerSchema } from './fields';
import { operation } from './operation';
import { listOf, pageQuerySchema } from './paging';

export const animalSchema = z
	.object({
		code: z.string(),
		species: z.enum(SPECIES),
		strain: z.string(),
		sex: z.enum(SEXES),
		birthDate: z.iso.date().nullable(),
		protocol: z.string().nullable().meta({ description: 'Number of the protocol in force today.' }),
		projects: z.array(z.string()),
		baselineWeightG: z.number().nullable(),
		status: z.enum(ANIMAL_STATUSES),
		weight: z
			.object({
				weightG: z.number(),
				share: z.number().nullable().meta({ description: 'Of the baseline weight.' }),
				at: momentAnswerSchema
			})
			.nullable()
			.meta({ description: 'The latest, without the implant.' }),
		implants: z.array(z.object({ letter: z.string(), surgeryDay: z.iso.date() })),
		isSimulated: z.boolean()
	})
	.meta({ id: 'Animal' });

export const listAnimals = operation({
	id: 'listAnimals',
	method: 'GET',
	path: '/api/v1/animals',
	tag: 'Animals',
	summary: 'Animals of the lab',
	permission: 'animals.read',
	query: pageQuerySchema.extend({ status: z.enum(ANIMAL_STATUSES).optional() }),
	status: 200,
	answer: listOf(animalSchema)
});

export const createAnimal = operation({
	id: 'createAnimal',
	method: 'POST',
	path: '/api/v1/animals',
	tag: 'Animals',
	summary: 'Add an animal',
	description: 'It may join a protocol (by number) and a project (by name) at once.',
	permission: 'animals.write',
	body: z.strictObject(newAnimalSchema.omit({ revision: true }).shape),
	status: 201,
	answer: animalSchema,
	answerHeaders: { Location: 'Address of the animal' }
});

export const getAnimal = operation({
	id: 'getAnimal',
	method: 'GET',
	path: '/api/v1/animals/{code}',
	tag: 'Animals',
	summary: 'One animal',
	permission: 'animals.read',
	params: animalParams,
	status: 200,
	answer: animalSchema
});
