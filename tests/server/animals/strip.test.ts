import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { DayCell } from '$lib/components/animal/day-strip';
import { setClock } from '$lib/server/clock';
import { db } from '$lib/server/db';
import { Session } from '$lib/server/models/session';
import * as animals from '$lib/server/services/animals';
import { makeActor } from '../../factories/actor';
import { makeAnalysis } from '../../factories/analysis';
import { makeAnimal } from '../../factories/animal';
import { makeDay } from '../../factories/day';
import { makeImplant } from '../../factories/implant';
import { makePerson } from '../../factories/person';
import { makeSession } from '../../factories/session';
import { makeSorting } from '../../factories/sorting';
import { makeTally } from '../../factories/tally';
import { makeTurn } from '../../factories/turn';
import { makeUnit } from '../../factories/unit';

const restore = setClock(() => new Date('2026-03-07T12:00:00Z'));
afterAll(restore);

let code: string;
let cells: DayCell[];
let welfare: Awaited<ReturnType<typeof makeActor>>;

/** Surgery on the 1st; turns on the 2nd; counts on the 3rd; sortings on the 4th, 5th and 6th. */
beforeAll(async () => {
	const animal = await makeAnimal();
	code = animal.code;
	const { carriages, bundles } = await makeImplant({
		animalId: animal.id,
		tetrodes: 3,
		surgeryDay: '2026-03-01'
	});
	await makeImplant({ animalId: animal.id, tetrodes: 1, letter: 'B', surgeryDay: '2026-03-06' });

	const turn = (n: number, turns: number, at: string) =>
		makeTurn({ carriageId: carriages[n].id, turns, doneAt: new Date(at) });
	await turn(0, 0.25, '2026-03-02T10:00:00Z');
	await turn(1, 0.5, '2026-03-02T10:01:00Z');
	// At 02:00 the evening before still goes on.
	await turn(1, 0.5, '2026-03-03T02:00:00Z');
	const wrong = await turn(2, 2, '2026-03-02T10:03:00Z');
	await makeTurn({
		carriageId: carriages[2].id,
		turns: 0,
		replacesId: wrong.id,
		doneAt: wrong.doneAt
	});

	const days = new Map<string, string>();
	for (const date of ['2026-03-03', '2026-03-04', '2026-03-05', '2026-03-06']) {
		const signed = date === '2026-03-03';
		const day = await makeDay({
			animalId: animal.id,
			date,
			...(signed && { state: 'signed' as const, responsibleId: (await makePerson()).id })
		});
		days.set(date, day.id);
	}
	const count = (n: number, principal: number, moment: 'before-move' | 'after-move', at: string) =>
		makeTally({
			dayId: days.get('2026-03-03'),
			bundleId: bundles[n].id,
			principal,
			multiUnit: 9,
			moment,
			takenAt: new Date(at)
		});
	await count(0, 6, 'before-move', '2026-03-03T08:00:00Z');
	await count(0, 4, 'after-move', '2026-03-03T18:00:00Z');
	await count(1, 3, 'before-move', '2026-03-03T08:00:00Z');

	const [ines, omar] = await Promise.all([makePerson(), makePerson()]);
	const sorted = async (date: string, personId: string, units: number, fields = {}) => {
		const session = await makeSession({ animalId: animal.id, dayId: days.get(date), ...fields });
		const sorting = await makeSorting({ sessionId: session.id, personId });
		for (let n = 0; n < units; n++) await makeUnit({ sortingId: sorting.id });
		await makeUnit({ sortingId: sorting.id, spikeCount: 0 });
		return { session, sorting };
	};
	const first = await sorted('2026-03-04', ines.id, 2);
	// Cut again: the older sorting no longer counts.
	const again = await makeSorting({
		sessionId: first.session.id,
		personId: ines.id,
		supersedesId: first.sorting.id
	});
	await makeUnit({ sortingId: again.id });
	await sorted('2026-03-05', ines.id, 3);
	await sorted('2026-03-05', ines.id, 2);
	const { session, sorting } = await sorted('2026-03-06', omar.id, 1);
	const analysis = await makeAnalysis({ sessionId: session.id, sortingId: sorting.id });
	await db().query(
		`UPDATE analysis SET state = 'done', result = '{}', median_error_cm = 7.25 WHERE id = $id`,
		{ bind: { id: analysis.id } }
	);
	await Session.update({ currentAnalysisId: analysis.id }, { where: { id: session.id } });

	welfare = await makeActor('welfare');
	cells = await animals.strip(await makeActor('observer'), code);
});

const on = (day: string) => cells.find((cell) => cell.day === day);

describe('day strip', () => {
	it('has one cell a day from the surgery to today', () => {
		expect(cells.map((cell) => cell.dayNumber)).toEqual([0, 1, 2, 3, 4, 5, 6]);
		expect(cells[0].day).toBe('2026-03-01');
	});

	it('shows the largest turn in force and how many carriages moved, by lab day', () => {
		expect(on('2026-03-02')).toMatchObject({ largestTurn: 0.5, movedCarriages: 2 });
		expect(on('2026-03-03')).toMatchObject({ largestTurn: null, movedCarriages: 0 });
	});

	it('adds the latest count of each bundle, hash aside', () => {
		expect(on('2026-03-03')?.yield).toEqual({ units: 7, source: 'tally' });
	});

	it('counts sorted units in force, and never adds sortings that share cells', () => {
		expect(on('2026-03-04')?.yield).toEqual({ units: 1, source: 'sorted' });
		expect(on('2026-03-05')?.yield).toEqual({ units: 3, source: 'sorted' });
	});

	it('leaves a day nobody counted empty rather than 0', () => {
		expect(on('2026-03-02')?.yield).toBeNull();
	});

	it('marks the hand that changed, another surgery, the error and the signature', () => {
		expect(cells.filter((cell) => cell.isSorterChange).map((cell) => cell.day)).toEqual([
			'2026-03-06'
		]);
		expect(cells.filter((cell) => cell.hasSurgery).map((cell) => cell.day)).toEqual(['2026-03-06']);
		expect(on('2026-03-06')?.errorCm).toBe(7.25);
		expect(on('2026-03-03')?.signature).toBe('signed');
		expect(on('2026-03-02')?.signature).toBe('none');
	});

	it('shows welfare the days without what the electrodes gave', async () => {
		const seen = await animals.strip(welfare, code);
		expect(seen).toHaveLength(7);
		expect(seen.every((cell) => cell.yield === null && cell.largestTurn === null)).toBe(true);
	});

	it('is empty without an implant', async () => {
		const { code: bare } = await makeAnimal();
		expect(await animals.strip(welfare, bare)).toEqual([]);
	});
});
