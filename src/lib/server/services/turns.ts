import type { Transaction } from 'sequelize';
import { turnCautions, type TurnCaution } from '$lib/analysis/geometry/turn-cautions';
import { partCode, partNamed } from '$lib/format/part-code';
import { turnSchema, type TurnEntry, type TurnInput } from '$lib/schemas/turn';
import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Invalid, NotFound } from '$lib/server/errors';
import type { Animal } from '$lib/server/models/animal';
import { Turn } from '$lib/server/models/turn';
import { parsed } from '$lib/server/parsed';
import { record as write } from '$lib/server/record';
import { animalOfCode } from './animal-of-code';
import { carriagesOf, standsOf, type CarriageFacts, type Stand } from './carriage-stands';
import { labClock, type LabClock } from './lab-clock';

/** A recorded turn with where its carriage stands after it. */
export interface TurnAnswer extends Stand {
	id: string;
	carriage: string;
	doneAt: Date;
	turns: number;
	reason: string;
	replaces: string | null;
	isEnteredLater: boolean;
	cautions: TurnCaution[];
}

/** One row of the ledger. The stand is null where the row is not in force. */
export interface TurnHistoryRow {
	id: string;
	carriageId: string;
	carriage: string;
	doneAt: Date;
	enteredAt: Date;
	turns: number;
	reason: string;
	person: string;
	isEnteredLater: boolean;
	replaces: string | null;
	replacedBy: string | null;
	stand: Stand | null;
}

/** Where a carriage stands. */
export interface CarriagePosition extends Stand {
	carriageId: string;
	carriage: string;
	code: string;
	site: string;
	screwOrder: number;
	travelUm: number;
	lastTurn: { turns: number; doneAt: Date } | null;
}

/** Enters a turn, or with `replaces` the correction of one. The person who acts did the turn. */
export async function record(
	by: Actor | null,
	animalCode: string,
	input: TurnInput
): Promise<TurnAnswer> {
	demand(by, 'turns.write');
	const entry = parsed(turnSchema, input);
	const personId = personOf(by);
	const clock = await labClock();
	return write(by, async (w) => {
		const animal = await animalOfCode(animalCode, w.t);
		const carriages = await carriagesOf(animal.id, w.t);
		const replaced = entry.replaces ? await rowOf(carriages, entry.replaces, w.t) : null;
		const carriage = carriageMeant(animal, carriages, entry, replaced);
		const doneAt = entry.doneAt ?? replaced?.doneAt ?? now();
		checkMoment(doneAt, carriage, clock);
		const turn = await Turn.create(
			{
				carriageId: carriage.id,
				doneAt,
				enteredAt: now(),
				turns: entry.turns,
				personId,
				reason: entry.reason,
				replacesId: replaced?.id ?? null,
				isEnteredLater: clock.dayOf(doneAt) < clock.today
			},
			{ transaction: w.t }
		);
		const answer = answerOf(carriage, turn, await Turn.ofCarriages([carriage.id], w.t));
		await w.log(
			verbOf(turn),
			{ kind: 'turn', id: turn.id },
			{
				carriage: partCode(animal.code, carriage),
				turns: turn.turns,
				doneAt: doneAt.toISOString(),
				depthUm: answer.depthUm,
				...(replaced && { replaces: replaced.id, was: replaced.turns, reason: turn.reason })
			}
		);
		return answer;
	});
}

/** Replaces a turn; 0 turns voids it. The earlier row stays readable. */
export function correct(
	by: Actor | null,
	animalCode: string,
	turnId: string,
	input: Omit<TurnInput, 'carriage' | 'replaces'>
): Promise<TurnAnswer> {
	return record(by, animalCode, { ...input, replaces: turnId });
}

/** Every row ever entered, by the time it was done; replaced rows are marked. */
export async function history(
	by: Actor | null,
	animalCode: string,
	{ carriage: named }: { carriage?: string } = {}
): Promise<TurnHistoryRow[]> {
	demand(by, 'data.read');
	const animal = await animalOfCode(animalCode);
	const all = await carriagesOf(animal.id);
	const carriages = named === undefined ? all : [carriageNamed(animal, all, named)];
	const rows = await Turn.ofCarriages(carriages.map(({ id }) => id));
	const replacedBy = new Map(rows.map(({ id, replacesId }) => [replacesId, id]));
	const stands = new Map(
		carriages.flatMap((carriage) =>
			standsOf(carriage, rows).after.map(({ turn, stand }) => [turn.id, stand])
		)
	);
	const labels = new Map(carriages.map(({ id, label }) => [id, label]));
	return rows.map((row) => ({
		id: row.id,
		carriageId: row.carriageId,
		carriage: labels.get(row.carriageId) ?? '',
		doneAt: row.doneAt,
		enteredAt: row.enteredAt,
		turns: row.turns,
		reason: row.reason,
		person: row.person?.name ?? '',
		isEnteredLater: row.isEnteredLater,
		replaces: row.replacesId,
		replacedBy: replacedBy.get(row.id) ?? null,
		stand: stands.get(row.id) ?? null
	}));
}

/** Where every carriage of the animal stands, now or at an earlier moment. */
export async function position(
	by: Actor | null,
	animalCode: string,
	{ at }: { at?: Date } = {}
): Promise<CarriagePosition[]> {
	demand(by, 'data.read');
	const animal = await animalOfCode(animalCode);
	const carriages = await carriagesOf(animal.id);
	const rows = await Turn.ofCarriages(carriages.map(({ id }) => id));
	return carriages.map((carriage) => {
		const { start, after } = standsOf(carriage, rows);
		const done = at ? after.filter(({ turn }) => turn.doneAt <= at) : after;
		const last = done.findLast(({ turn }) => turn.turns !== 0);
		return {
			carriageId: carriage.id,
			carriage: carriage.label,
			code: partCode(animal.code, carriage),
			site: carriage.site,
			screwOrder: carriage.screwOrder,
			travelUm: carriage.travelUm,
			...(done.at(-1)?.stand ?? start),
			lastTurn: last ? { turns: last.turn.turns, doneAt: last.turn.doneAt } : null
		};
	});
}

async function rowOf(
	carriages: CarriageFacts[],
	id: string,
	transaction: Transaction
): Promise<Turn> {
	const row = await Turn.findByPk(id, { transaction });
	// A turn of another animal looks like one that is not there.
	if (!row || !carriages.some((carriage) => carriage.id === row.carriageId)) throw new NotFound();
	return row;
}

function carriageMeant(
	animal: Animal,
	carriages: CarriageFacts[],
	{ carriage: named }: TurnEntry,
	replaced: Turn | null
): CarriageFacts {
	return carriageNamed(animal, carriages, named ?? replaced?.carriageId ?? '');
}

function carriageNamed(animal: Animal, carriages: CarriageFacts[], named: string): CarriageFacts {
	const carriage = partNamed(carriages, named, animal.code);
	if (carriage) return carriage;
	const message = `${animal.code} has no carriage "${named}". Write its name as on the implant's page.`;
	throw new Invalid([{ field: 'carriage', message }]);
}

function checkMoment(doneAt: Date, carriage: CarriageFacts, clock: LabClock): void {
	const refuse = (message: string) => {
		throw new Invalid([{ field: 'doneAt', message }]);
	};
	// Clocks of tablets run a little ahead; a minute of grace keeps an honest entry.
	if (doneAt.getTime() > now().getTime() + 60_000) refuse('A turn is entered once it is done.');
	if (clock.dayOf(doneAt) < carriage.surgeryDay) {
		refuse(`The implant was made on ${carriage.surgeryDay}; no screw was turned before.`);
	}
}

function answerOf(carriage: CarriageFacts, turn: Turn, rows: Turn[]): TurnAnswer {
	const { after } = standsOf(carriage, rows);
	const place = after.findIndex((row) => row.turn.id === turn.id);
	const { stand } = after[place];
	const before = after.slice(0, place).findLast((row) => row.turn.turns !== 0);
	return {
		id: turn.id,
		carriage: carriage.label,
		doneAt: turn.doneAt,
		turns: turn.turns,
		reason: turn.reason,
		replaces: turn.replacesId,
		isEnteredLater: turn.isEnteredLater,
		...stand,
		cautions: turnCautions(turn.turns, before?.turn.turns ?? 0, stand.travelLeftUm, carriage)
	};
}

function verbOf({ replacesId, turns }: Turn): string {
	if (replacesId === null) return 'turn.record';
	return turns === 0 ? 'turn.void' : 'turn.correct';
}
