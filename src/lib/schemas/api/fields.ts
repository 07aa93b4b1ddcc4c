import { z } from 'zod';

/** A moment given by a script: ISO 8601 with its zone, because a lab's clock is not the server's. */
export const momentSchema = z.iso
	.datetime({
		offset: true,
		error: 'Give date, time and zone, like 2026-04-09T10:30:00+02:00.'
	})
	.transform((text) => new Date(text))
	.meta({ override: { type: 'string', format: 'date-time' } });

/** A moment in an answer, always UTC. */
export const momentAnswerSchema = z
	.date()
	.transform((at) => at.toISOString())
	.pipe(z.iso.datetime());

export const animalCodeSchema = z
	.string()
	.max(40)
	.meta({ description: 'Code of the animal.', example: 'R031' });

export const animalParams = z.object({ code: animalCodeSchema });

export const idParams = z.object({ id: z.uuid() });
