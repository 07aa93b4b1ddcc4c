import { createHash } from 'node:crypto';
import type { z } from 'zod';
import type { daySchema } from '$lib/schemas/api/days';
import type { Actor } from '$lib/server/access';
import * as animals from '$lib/server/services/animals';
import * as days from '$lib/server/services/days';
import * as tallies from '$lib/server/services/tallies';

/** What a day's address answers, to reading and to writing alike. */
export async function readDay(
	by: Actor,
	{ code, date }: { code: string; date: string }
): Promise<z.input<typeof daySchema>> {
	const [animal, day, counts] = await Promise.all([
		animals.get(by, code),
		days.get(by, code, date),
		tallies.list(by, code, date)
	]);
	return { animal: animal.code, date, state: day.state, entry: null, tallies: counts };
}

/** A day has no number of its own that every change moves, so its content is its tag. */
export function etagOf(day: z.output<typeof daySchema>): string {
	return `"${createHash('sha256').update(JSON.stringify(day)).digest('base64url').slice(0, 22)}"`;
}
