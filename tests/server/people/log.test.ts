import { describe, expect, it } from 'vitest';
import { withClient } from '../../../src/commands/cluster/roles';
import { systemActor } from '$lib/server/access';
import { db } from '$lib/server/db';
import { Forbidden } from '$lib/server/errors';
import { record } from '$lib/server/record';
import * as log from '$lib/server/services/log';
import { makeActor } from '../../factories/actor';

async function write(n: number, by = systemActor()) {
	for (let i = 0; i < n; i += 1) {
		await record(by, (w) => w.log('project.noted', { kind: 'project', id: null }, { i }));
	}
}

/** As somebody with the owner's password would do it, past the triggers; put back afterwards. */
async function tamper<T>(sql: string[], look: () => Promise<T>): Promise<T> {
	return withClient(process.env.DATABASE_OWNER_URL ?? '', async (client) => {
		await client.query('CREATE TABLE log_kept AS SELECT * FROM log');
		await client.query('ALTER TABLE log DISABLE TRIGGER USER');
		try {
			for (const line of sql) await client.query(line);
			return await look();
		} finally {
			await client.query('DELETE FROM log');
			await client.query('INSERT INTO log SELECT * FROM log_kept ORDER BY id');
			await client.query('ALTER TABLE log ENABLE TRIGGER USER');
			await client.query('DROP TABLE log_kept');
		}
	});
}

describe('the chain', () => {
	it('verifies as written, whole or its end', async () => {
		await write(6);
		const by = systemActor('command');
		const whole = await log.verify(by);
		expect(whole).toMatchObject({ isIntact: true, isWhole: true, firstFault: null });
		expect(whole.checked).toBeGreaterThanOrEqual(6);
		expect(await log.verify(by, 3)).toEqual({
			isIntact: true,
			checked: 3,
			isWhole: false,
			firstFault: null
		});
	});

	it.each([
		['a changed detail', ["UPDATE log SET detail = '{}' WHERE id = 4"], 4, /changed/],
		['a changed person', ['UPDATE log SET via = $$token$$ WHERE id = 3'], 3, /changed/],
		['a changed moment', ["UPDATE log SET at = at - interval '1 day' WHERE id = 2"], 2, /changed/],
		['a removed row', ['DELETE FROM log WHERE id = 3'], 4, /missing/],
		['a removed beginning', ['DELETE FROM log WHERE id = 1'], 2, /missing/],
		[
			'a row changed together with its own hash',
			[
				"UPDATE log SET detail = '{}' WHERE id = 4",
				'UPDATE log l SET hash = sha256(log_payload(l)) WHERE id = 4'
			],
			5,
			/does not follow/
		],
		[
			'two rows put the other way round',
			[
				'UPDATE log SET id = -3 WHERE id = 3',
				'UPDATE log SET id = 3 WHERE id = 4',
				'UPDATE log SET id = 4 WHERE id = -3'
			],
			3,
			/does not follow/
		]
	])('shows %s', async (_, sql, id, why) => {
		await write(6);
		const verdict = await tamper(sql, () => log.verify(systemActor('command')));
		expect(verdict.isIntact).toBe(false);
		expect(verdict.firstFault).toMatchObject({ id, why: expect.stringMatching(why) });
		expect((await log.verify(systemActor('command'))).isIntact).toBe(true);
	});

	it('is not to be changed by the application’s role, nor by the owner while its triggers stand', async () => {
		await write(1);
		await expect(db().query("UPDATE log SET via = 'page'")).rejects.toThrow(/permission denied/);
		const byOwner = withClient(process.env.DATABASE_OWNER_URL ?? '', (client) =>
			client.query("UPDATE log SET via = 'page'")
		);
		await expect(byOwner).rejects.toThrow(/kept as written/);
	});
});

describe('reading the log', () => {
	it('filters by person, kind, action and time, and pages backwards', async () => {
		const pi = await makeActor('pi');
		await write(60, pi);
		const first = await log.page(pi, { personId: pi.personId });
		expect(first.items).toHaveLength(50);
		expect(first.items[0]).toMatchObject({ personName: pi.name, action: 'project.noted' });
		const second = await log.page(pi, { personId: pi.personId, before: first.next ?? 0 });
		expect(second.items).toHaveLength(10);
		expect(second.next).toBeNull();
		expect((await log.page(pi, { action: 'project' })).items.length).toBeGreaterThan(0);
		expect((await log.page(pi, { action: 'proj' })).items).toEqual([]);
		expect((await log.page(pi, { subjectKind: 'animal' })).items).toEqual([]);
		expect((await log.page(pi, { to: new Date('2020-01-01') })).items).toEqual([]);
	});

	it.each(['observer', 'experimenter', 'surgeon', 'welfare'] as const)(
		'is refused to a %s',
		async (role) => {
			const by = await makeActor(role);
			await expect(log.page(by)).rejects.toThrow(Forbidden);
			await expect(log.verify(by)).rejects.toThrow(Forbidden);
			await expect(log.kinds(by)).rejects.toThrow(Forbidden);
		}
	);
});
