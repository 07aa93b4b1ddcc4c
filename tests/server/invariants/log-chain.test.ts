import { createHash } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { systemActor } from '$lib/server/access';
import { db } from '$lib/server/db';
import { Project } from '$lib/server/models/project';
import { record } from '$lib/server/record';
import { withClient } from '../../../src/commands/cluster/roles';
import { makeActor } from '../../factories/actor';
import { ask } from './catalogue';

interface LogRow {
	id: number;
	previous: string;
	hash: string;
	payload: string;
}

const chain = () =>
	ask<LogRow>(
		`SELECT id, encode(previous_hash, 'hex') AS previous, encode(hash, 'hex') AS hash,
			convert_from(log_payload(log), 'UTF8') AS payload FROM log ORDER BY id`
	);

const writeOne = (name: string) =>
	record(systemActor(), async (w) => {
		const project = await Project.create({ name }, { transaction: w.t });
		await w.log('project.create', { kind: 'project', id: project.id }, { name });
		return project;
	});

describe('the log', () => {
	it('links every row to the one before, without a gap, under many writers at once', async () => {
		await Promise.all(Array.from({ length: 24 }, (_, i) => writeOne(`Chained ${i}`)));
		const rows = await chain();
		expect(rows.length).toBeGreaterThanOrEqual(24);
		rows.forEach((row, i) => {
			expect(row.id).toBe(i + 1);
			expect(row.previous).toBe(i === 0 ? '00' : rows[i - 1].hash);
			expect(row.hash).toBe(createHash('sha256').update(row.payload, 'utf8').digest('hex'));
		});
	});

	it('leaves no gap where a write was given up', async () => {
		await writeOne('Before');
		await expect(writeOne('before')).rejects.toThrow('A project of this name exists.');
		await writeOne('After');
		const ids = (await chain()).map(({ id }) => id);
		expect(ids).toEqual(ids.map((_, i) => i + 1));
	});

	it('names who acted and by which door', async () => {
		const by = await makeActor('pi');
		await record({ ...by, via: 'token' }, async (w) => {
			await w.log('project.note', { kind: 'project', id: null });
		});
		const [row] = await ask<{ person: string; via: string }>(
			'SELECT person_id AS person, via FROM log ORDER BY id DESC LIMIT 1'
		);
		expect(row).toEqual({ person: by.personId, via: 'token' });
	});

	it("shows a row that was changed behind the product's back", async () => {
		await writeOne('Tampered');
		await withClient(process.env.DATABASE_OWNER_URL ?? '', async (client) => {
			await client.query('ALTER TABLE log DISABLE TRIGGER log_immutable');
			await client.query(`UPDATE log SET detail = '{"name":"other"}' WHERE id = 1`);
			await client.query('ALTER TABLE log ENABLE TRIGGER log_immutable');
		});
		const [first] = await chain();
		expect(createHash('sha256').update(first.payload, 'utf8').digest('hex')).not.toBe(first.hash);
	});

	it('cannot be changed by its owner either while its triggers stand', async () => {
		await withClient(process.env.DATABASE_OWNER_URL ?? '', async (client) => {
			await expect(client.query(`UPDATE log SET action = 'a.b'`)).rejects.toThrow(
				/kept as written/
			);
			await expect(client.query('DELETE FROM log')).rejects.toThrow(/kept as written/);
			await expect(client.query('TRUNCATE log')).rejects.toThrow(/kept as written/);
		});
	});
});

describe('a write that fails', () => {
	const counts = async () => {
		const [row] = await db().query<{ projects: number; logged: number; jobs: number }>(
			`SELECT (SELECT count(*) FROM project) AS projects, (SELECT count(*) FROM log) AS logged,
			(SELECT count(*) FROM pgboss.job) AS jobs`,
			{ type: QueryTypes.SELECT }
		);
		return row;
	};

	it('leaves neither row nor log nor job', async () => {
		const before = await counts();
		const cutOff = record(systemActor(), async (w) => {
			const project = await Project.create({ name: 'Never' }, { transaction: w.t });
			await w.log('project.create', { kind: 'project', id: project.id });
			await w.enqueue('analyse', { analysisId: project.id });
			throw new Error('cut off');
		});
		await expect(cutOff).rejects.toThrow('cut off');
		expect(await counts()).toEqual(before);
	});

	it('is one that logs nothing', async () => {
		const before = await counts();
		const silent = record(systemActor(), (w) =>
			Project.create({ name: 'Unlogged' }, { transaction: w.t })
		);
		await expect(silent).rejects.toThrow('without a log row');
		expect(await counts()).toEqual(before);
	});

	it('keeps row, log and job together when it succeeds', async () => {
		const before = await counts();
		await record(systemActor(), async (w) => {
			const project = await Project.create({ name: 'Whole' }, { transaction: w.t });
			await w.log('project.create', { kind: 'project', id: project.id });
			await w.enqueue('analyse', { analysisId: project.id });
		});
		expect(await counts()).toEqual({
			projects: before.projects + 1,
			logged: before.logged + 1,
			jobs: before.jobs + 1
		});
	});
});
