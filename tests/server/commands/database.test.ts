import { execFileSync } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findPostgres } from '../../../src/commands/cluster/programs';
import { withClient } from '../../../src/commands/cluster/roles';
import { makeThrowAwayHome, removeHome } from '../../../src/commands/cluster/throw-away';
import type { Home } from '../../../src/commands/home/home';
import { isEmpty } from '../../../src/commands/lab-run/backup';
import {
	bringUpToDate,
	discardHalfFilled,
	fillOnce,
	openDatabase,
	type LabDatabase
} from '../../../src/commands/lab-run/database';

let home: Home;
let database: LabDatabase;
let given: string | undefined;

beforeAll(async () => {
	given = process.env.DATABASE_URL;
	delete process.env.DATABASE_URL;
	home = makeThrowAwayHome('database-test');
	database = await openDatabase(home, true);
});
afterAll(async () => {
	await database.stop();
	removeHome(home);
	process.env.DATABASE_URL = given;
});

const addPerson = () =>
	withClient(database.ownerUrl, async (client) => {
		await client.query(
			"INSERT INTO person (id, email, name) VALUES (gen_random_uuid(), 'a@lab.example', 'A')"
		);
	});

describe('bringing the database up to date', () => {
	it('makes no backup of an empty database', async () => {
		await bringUpToDate(home, database);
		expect(existsSync(home.file('backups'))).toBe(false);
		expect(await isEmpty(database.ownerUrl)).toBe(true);
	});
});

describe('filling the demo lab', () => {
	it('begins again from nothing after it was cut off', async () => {
		const cutOff = fillOnce(home, database, async () => {
			await addPerson();
			throw new Error('cut off');
		});
		await expect(cutOff).rejects.toThrow('cut off');
		await discardHalfFilled(home, database);
		await bringUpToDate(home, database);
		expect(await isEmpty(database.ownerUrl)).toBe(true);
	});

	it('fills an empty database and leaves a filled one alone', async () => {
		await fillOnce(home, database, addPerson);
		expect(await isEmpty(database.ownerUrl)).toBe(false);
		await fillOnce(home, database, () => Promise.reject(new Error('filled twice')));
		await discardHalfFilled(home, database);
		expect(await isEmpty(database.ownerUrl)).toBe(false);
	});
});

describe('a backup', () => {
	it('is made before an update changes records, for this user alone, and can be read', async () => {
		// As the database stood before the newest migration came.
		await withClient(database.ownerUrl, (client) =>
			client.query(
				"UPDATE migration SET name = name || '-unknown' WHERE name = (SELECT max(name) FROM migration)"
			)
		);
		// The migration cannot run twice; what counts is what was kept before it was tried.
		await expect(bringUpToDate(home, database)).rejects.toThrow(/already exists/);

		const [name, ...others] = readdirSync(home.file('backups'));
		expect(others).toEqual([]);
		const file = home.file('backups', name);
		expect(statSync(file).mode & 0o077).toBe(0);
		const restore = findPostgres()?.program('pg_restore') ?? '';
		expect(execFileSync(restore, ['--list', file], { encoding: 'utf8' })).toContain(
			'TABLE DATA public person'
		);
	});
});
