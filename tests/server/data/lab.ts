import { createReadStream } from 'node:fs';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import type { Actor } from '$lib/server/access';
import type { DataKind } from '$lib/schemas/enumerations';
import type { AnalysisView } from '$lib/server/services/analyses';
import * as analyses from '$lib/server/services/analyses';
import * as dataFiles from '$lib/server/services/data-files';
import * as takeIn from '$lib/server/services/take-in';
import { makeActor } from '../../factories/actor';
import { makeSession } from '../../factories/session';
import { makeArena } from '../../factories/arena';
import { makeAnimal } from '../../factories/animal';

export type Person = Actor & { personId: string };

export interface Bench {
	by: Person;
	animal: string;
	sessionId: string;
}

/** An experimenter with a session on a straight track of 100 cm, run from 0 to 600 s. */
export async function makeBench(description = 'straight:100'): Promise<Bench> {
	const by = await makeActor('experimenter');
	const animal = await makeAnimal();
	const arena = await makeArena({ description });
	const session = await makeSession({
		animalId: animal.id,
		arenaId: arena.id,
		createdBy: by.personId
	});
	return { by, animal: animal.code, sessionId: session.id };
}

export function fixture(...path: string[]): string {
	return join(process.cwd(), 'tests/fixtures', ...path);
}

export const fileOf = (path: string): Readable => createReadStream(path);

/** Sends a text or bytes as a file and asks for it to be taken in. */
export async function send(
	{ by, sessionId }: Bench,
	kind: DataKind,
	content: string | Uint8Array,
	name = `${kind}.csv`,
	choice: unknown = {}
): Promise<dataFiles.DataFileView> {
	const bytes = typeof content === 'string' ? Buffer.from(content) : Buffer.from(content);
	const received = await dataFiles.receive(by, {
		sessionId,
		kind,
		name,
		content: Readable.from([bytes])
	});
	return takeIn.takeIn(by, received.id, choice);
}

/** Positions that run up and down a 100 cm track at 20 cm/s, 20 a second. */
export function walk(seconds = 120, fromS = 0): string {
	const rows = Array.from({ length: seconds * 20 }, (_, i) => {
		const t = i / 20;
		const along = (t * 20) % 200;
		return `${(fromS + t).toFixed(3)},${(along < 100 ? along : 200 - along).toFixed(2)}`;
	});
	return ['t_s,x_cm', ...rows].join('\n') + '\n';
}

/** Spikes of a unit that fires whenever the walk passes 50 cm, and of one that fires evenly. */
export function spikes(seconds = 120, fromS = 0): string {
	const rows: string[] = [];
	for (let t = 2.2; t < seconds - 1; t += 5) {
		for (let k = 0; k < 6; k++) rows.push(`1,${(fromS + t + k * 0.1).toFixed(3)},T01`);
	}
	for (let t = 0.5; t < seconds - 1; t += 0.9) rows.push(`2,${(fromS + t).toFixed(3)},T02`);
	return ['unit,t_s,bundle', ...rows].join('\n') + '\n';
}

/** Waits until a worker has ended an analysis. */
export async function ended(by: Actor, id: string, withinMs = 30_000): Promise<AnalysisView> {
	const until = performance.now() + withinMs;
	for (;;) {
		const { state } = await analyses.standing(by, id);
		if (state === 'done' || state === 'failed') return analyses.get(by, id);
		if (performance.now() > until) throw new Error(`The analysis is still ${state}`);
		await new Promise((resolve) => setTimeout(resolve, 100));
	}
}
