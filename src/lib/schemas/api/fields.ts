import { z } from 'zod';

/** A moment given by a script, with its offset: a lab's clock is not the server's. */
export const momentSchema = z.iso.datetime({
	offset: true,
	error: 'Give date, time and offset, like 2026-04-09T10:30:00+02:00.'
});

/** A moment in an answer, always UTC. */
export const momentAnswerSchema = z.iso.datetime();

/** The same for services that give dates. */
export const dateAnswerSchema = z
	.date()
	.transform((at) => at.toISOString())
	.pipe(momentAnswerSchema);

export const animalCodeSchema = z
	.string()
	.max(40)
	.meta({ description: 'Code of the animal.', example: 'R031' });

export const animalParams = z.object({ code: animalCodeSchema });

export const idParams = z.object({ id: z.uuid() });
