import type { Actor } from '$lib/server/access';
import { labClock } from '$lib/server/services/lab-clock';
import * as sessions from '$lib/server/services/sessions';
import * as tallies from '$lib/server/services/tallies';
import * as turns from '$lib/server/services/turns';

/** What was done with the animal on one lab day. */
export async function dayFacts(by: Actor | null, code: string, day: string) {
	const { dayOf } = await labClock();
	const [recorded, counted, ledger] = await Promise.all([
		sessions.list(by, { animal: code, day }),
		tallies.list(by, code, day),
		turns.history(by, code)
	]);
	return {
		day,
		sessions: recorded,
		tallies: counted.map((row) => ({
			id: row.id,
			bundle: row.bundle,
			source: row.source,
			principal: row.principal,
			interneuron: row.interneuron,
			unclear: row.unclear,
			multiUnit: row.multiUnit
		})),
		turns: ledger
			.filter((row) => row.stand && row.turns !== 0 && dayOf(row.doneAt) === day)
			.map(({ id, carriage, turns: amount, doneAt, person, stand }) => ({
				...{ id, carriage, turns: amount, person },
				doneAt: doneAt.toISOString(),
				depthUm: stand?.depthUm ?? null
			}))
	};
}

export type DayFacts = Awaited<ReturnType<typeof dayFacts>>;
