import { describe, expect, it } from 'vitest';
import { systemActor } from '$lib/server/access';
import { db } from '$lib/server/db';
import { Exclusion } from '$lib/server/models/exclusion';
import { record, type Write } from '$lib/server/record';
import { withClient } from '../../../src/commands/cluster/roles';
import { makeAnalysis } from '../../factories/analysis';
import { makeDay } from '../../factories/day';
import { makePerson } from '../../factories/person';
import { makeTurn } from '../../factories/turn';
import { makeUnit } from '../../factories/unit';

const written = (work: (t: Write['t']) => Promise<unknown>) =>
	record(systemActor(), async (w) => {
		await work(w.t);
		await w.log('test.write', { kind: 'test', id: null });
	});

describe('a signed day', () => {
	it('does not go back to draft, and countersigned not back to signed', async () => {
		const responsibleId = (await makePerson()).id;
		const day = await makeDay({ state: 'signed', responsibleId });
		const back = written((transaction) => day.update({ state: 'draft' }, { transaction }));
		await expect(back).rejects.toMatchObject({ code: 'day-signed' });
		const further = await makeDay({ state: 'countersigned', responsibleId });
		await expect(
			written((transaction) => further.update({ state: 'signed' }, { transaction }))
		).rejects.toMatchObject({ code: 'day-signed' });
	});

	it('goes forward', async () => {
		const day = await makeDay({ responsibleId: (await makePerson()).id });
		for (const state of ['signed', 'countersigned'] as const) {
			await written((transaction) => day.update({ state }, { transaction }));
		}
	});

	it('needs somebody responsible', async () => {
		await expect(makeDay({ state: 'signed' })).rejects.toThrow();
	});

	it('keeps its date', async () => {
		const day = await makeDay();
		await expect(
			written((transaction) => day.update({ date: '2026-03-09' }, { transaction }))
		).rejects.toMatchObject({ code: 'day-signed' });
	});
});

describe('a finished analysis', () => {
	const change = async (id: string, columns: string) =>
		written((transaction) =>
			db().query(`UPDATE analysis SET ${columns} WHERE id = $id`, { bind: { id }, transaction })
		);

	it('cannot be changed, not even its result', async () => {
		const { id } = await makeAnalysis();
		await change(id, `state = 'done', result = '{"medianErrorCm": 1}'`);
		for (const columns of [
			`result = '{"medianErrorCm": 0.1}'`,
			'progress = 0.5',
			'warnings = NULL'
		]) {
			await expect(change(id, columns)).rejects.toMatchObject({ code: 'analysis-final' });
		}
	});

	it('and an unfinished one keeps what it was asked for', async () => {
		const { id } = await makeAnalysis();
		await change(id, `state = 'running', progress = 0.4`);
		await expect(change(id, `parameters = '{"seed": 2}'`)).rejects.toMatchObject({
			code: 'analysis-final'
		});
	});
});

describe('what was written', () => {
	it('stays for turns and for spikes, even for the owner of the database', async () => {
		const turn = await makeTurn();
		const unit = await makeUnit();
		await withClient(process.env.DATABASE_OWNER_URL ?? '', async (client) => {
			await expect(
				client.query('UPDATE turn SET turns = 1 WHERE id = $1', [turn.id])
			).rejects.toThrow(/kept as written/);
			await expect(client.query('DELETE FROM turn WHERE id = $1', [turn.id])).rejects.toThrow(
				/kept as written/
			);
			await expect(
				client.query(`UPDATE unit SET spikes = '' WHERE id = $1`, [unit.id])
			).rejects.toThrow(/kept as written/);
		});
	});
});

describe('an exclusion', () => {
	it('is of exactly one thing', async () => {
		const base = {
			reason: 'unstable' as const,
			wasResultSeen: false,
			personId: (await makePerson()).id
		};
		const [unit, day] = [await makeUnit(), await makeDay()];
		const exclude = (of: { unitId?: string; dayId?: string }) =>
			written((transaction) => Exclusion.create({ ...base, ...of }, { transaction }));
		await expect(exclude({})).rejects.toMatchObject({ code: 'exclude-one-thing' });
		await expect(exclude({ unitId: unit.id, dayId: day.id })).rejects.toMatchObject({
			code: 'exclude-one-thing'
		});
		await expect(exclude({ dayId: day.id })).resolves.toBeUndefined();
	});
});
