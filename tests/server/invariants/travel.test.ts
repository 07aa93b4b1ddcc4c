import { describe, expect, it } from 'vitest';
import type { CreationAttributes } from 'sequelize';
import { foldTurns } from '$lib/analysis/geometry/fold-turns';
import { seeded } from '$lib/analysis/random/seeded';
import { shuffled } from '$lib/analysis/random/shuffled';
import { Conflict } from '$lib/server/errors';
import { Turn } from '$lib/server/models/turn';
import { record } from '$lib/server/record';
import { withClient } from '../../../src/commands/cluster/roles';
import { makeActor } from '../../factories/actor';
import { makeImplant } from '../../factories/implant';
import { makePerson } from '../../factories/person';
import { ask } from './catalogue';

const at = (minute: number) => new Date(Date.UTC(2026, 2, 2, 9, minute));

const screwUm = async (carriageId: string) => {
	const [row] = await ask<{ um: number }>(
		`SELECT screw_um AS um FROM turn_in_force WHERE carriage_id = '${carriageId}'
		ORDER BY done_at DESC, id DESC LIMIT 1`
	);
	return row?.um ?? 0;
};

async function carriageOfTravel(travelUm: number) {
	const { carriages } = await makeImplant({ tetrodes: 1, travelUm });
	return carriages[0].id;
}

async function tryTurn(fields: CreationAttributes<Turn>): Promise<Turn | Conflict> {
	const by = await makeActor('experimenter');
	try {
		return await record(by, async (w) => {
			const turn = await Turn.create(fields, { transaction: w.t });
			await w.log('turn.record', { kind: 'turn', id: turn.id });
			return turn;
		});
	} catch (refusal) {
		if (refusal instanceof Conflict) return refusal;
		throw refusal;
	}
}

describe('travel', () => {
	it('is refused beyond either end, in words, and leaves the ledger as it was', async () => {
		const carriageId = await carriageOfTravel(1000);
		const personId = (await makePerson()).id;
		const past = await tryTurn({ carriageId, personId, doneAt: at(0), turns: 4 });
		expect(past).toMatchObject({ code: 'beyond-travel' });
		const above = await tryTurn({ carriageId, personId, doneAt: at(0), turns: -0.125 });
		expect(above).toMatchObject({ code: 'beyond-travel' });
		expect(await screwUm(carriageId)).toBe(0);
	});

	it('is checked at every moment, so a later turn cannot excuse an earlier one', async () => {
		const carriageId = await carriageOfTravel(1000);
		const personId = (await makePerson()).id;
		await tryTurn({ carriageId, personId, doneAt: at(5), turns: 1 });
		const before = await tryTurn({ carriageId, personId, doneAt: at(1), turns: -0.5 });
		expect(before).toMatchObject({ code: 'beyond-travel' });
	});

	it('counts where the screw stood at surgery', async () => {
		const { carriages } = await makeImplant({ tetrodes: 1, travelUm: 1000 });
		await carriages[0].update({ startScrewUm: 800 });
		const personId = (await makePerson()).id;
		const turn = { carriageId: carriages[0].id, personId, doneAt: at(0) };
		expect(await tryTurn({ ...turn, turns: 0.75 })).toMatchObject({ code: 'beyond-travel' });
		expect(await tryTurn({ ...turn, turns: 0.5 })).toBeInstanceOf(Turn);
		expect(await tryTurn({ ...turn, doneAt: at(1), turns: -3 })).toBeInstanceOf(Turn);
	});

	it('holds when two writers turn the same screw at the same moment', async () => {
		const carriageId = await carriageOfTravel(1000);
		const personId = (await makePerson()).id;
		const url = process.env.DATABASE_URL ?? '';
		const insert = `INSERT INTO turn (id, carriage_id, done_at, turns, person_id)
			VALUES (gen_random_uuid(), '${carriageId}', now(), 2, '${personId}')`;
		// Each alone fits (635 of 1000 µm); both do not.
		await withClient(url, (first) =>
			withClient(url, async (second) => {
				await first.query('BEGIN');
				await second.query('BEGIN');
				await first.query(insert);
				const waiting = second.query(insert).then(
					() => 'recorded',
					(fault: Error) => fault.message
				);
				await first.query('COMMIT');
				expect(await waiting).toMatch(/would stand at 1270/);
				await second.query('ROLLBACK');
			})
		);
		expect(await screwUm(carriageId)).toBe(635);
	});

	it('admits exactly as many of a crowd of writers as fit', async () => {
		const carriageId = await carriageOfTravel(1000);
		const personId = (await makePerson()).id;
		const answers = await Promise.all(
			Array.from({ length: 8 }, (_, i) =>
				tryTurn({ carriageId, personId, doneAt: at(i), turns: 1 })
			)
		);
		expect(answers.filter((answer) => answer instanceof Turn)).toHaveLength(3);
		expect(await screwUm(carriageId)).toBe(952.5);
	});
});

describe('a correction', () => {
	it('replaces a row once, and only on its own carriage', async () => {
		const { carriages } = await makeImplant({ tetrodes: 2 });
		const personId = (await makePerson()).id;
		const [a, b] = carriages.map(({ id }) => id);
		const turn = await tryTurn({ carriageId: a, personId, doneAt: at(0), turns: 1 });
		if (turn instanceof Conflict) throw turn;
		const fix = { personId, doneAt: at(0), turns: 0.5, replacesId: turn.id };
		expect(await tryTurn({ ...fix, carriageId: b })).toMatchObject({ code: 'wrong-carriage' });
		expect(await tryTurn({ ...fix, carriageId: a })).toBeInstanceOf(Turn);
		expect(await tryTurn({ ...fix, carriageId: a })).toMatchObject({ code: 'already-corrected' });
		expect(await screwUm(a)).toBe(158.75);
	});

	it('to nothing voids a row; nothing else may turn by nothing', async () => {
		const carriageId = await carriageOfTravel(1000);
		const personId = (await makePerson()).id;
		const zero = { carriageId, personId, doneAt: at(0), turns: 0 };
		expect(await tryTurn(zero)).toMatchObject({ code: 'nothing-turned' });
		const turn = await tryTurn({ ...zero, turns: 1 });
		if (turn instanceof Conflict) throw turn;
		await tryTurn({ ...zero, replacesId: turn.id });
		expect(await screwUm(carriageId)).toBe(0);
	});

	it('is refused when a later turn would then pass the end', async () => {
		const carriageId = await carriageOfTravel(1000);
		const personId = (await makePerson()).id;
		const down = await tryTurn({ carriageId, personId, doneAt: at(0), turns: 3 });
		if (down instanceof Conflict) throw down;
		await tryTurn({ carriageId, personId, doneAt: at(1), turns: -2 });
		const void_ = { carriageId, personId, doneAt: at(0), turns: 0, replacesId: down.id };
		expect(await tryTurn(void_)).toMatchObject({ code: 'beyond-travel' });
	});
});

describe('the ledger', () => {
	it('folds to the same depths whatever the order of entry (300 random ledgers)', () => {
		const random = seeded(11, 'ledger');
		for (let ledger = 0; ledger < 300; ledger++) {
			const turns = Array.from(
				{ length: 1 + random.below(12) },
				() => (random.below(33) - 12) / 16
			);
			const order = shuffled(turns.length, random);
			const entered = [...order].map((i) => ({ doneAt: i, turns: turns[i] }));
			const sorted = entered.sort((a, b) => a.doneAt - b.doneAt).map((row) => row.turns);
			const settings = { pitchUm: 317.5, backlashUm: 40 };
			expect(foldTurns(sorted, settings)).toEqual(foldTurns(turns, settings));
		}
	});

	it('stands the same in the database whatever the order of entry, corrections included', async () => {
		const random = seeded(12, 'ledger');
		const personId = (await makePerson()).id;
		for (let round = 0; round < 6; round++) {
			const { carriages } = await makeImplant({ tetrodes: 2, travelUm: 6000 });
			// A first large turn keeps every order of the rest within travel.
			const turns = Array.from({ length: 8 }, () => (random.below(17) - 8) / 16 || 0.125);
			const fixed = random.below(8);
			const stands: { turns: number; um: number }[][] = [];
			for (const carriage of carriages) {
				const base = { carriageId: carriage.id, personId };
				await Turn.create({ ...base, doneAt: at(0), turns: 8 });
				let wrong = '';
				for (const i of shuffled(8, random)) {
					const row = await Turn.create({ ...base, doneAt: at(i + 1), turns: turns[i] });
					if (i === fixed) wrong = row.id;
				}
				await Turn.create({ ...base, doneAt: at(fixed + 1), turns: 0.25, replacesId: wrong });
				stands.push(
					await ask<{ turns: number; um: number }>(
						`SELECT turns, screw_um AS um FROM turn_in_force
						WHERE carriage_id = '${carriage.id}' ORDER BY done_at`
					)
				);
			}
			expect(stands[1]).toEqual(stands[0]);
			const folded = foldTurns(
				stands[0].map((row) => row.turns),
				{ pitchUm: 317.5, backlashUm: 40 }
			);
			expect(stands[0].map((row) => row.um)).toEqual([...folded.screwUm]);
		}
	});
});
