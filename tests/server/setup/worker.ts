import { mkdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, inject } from 'vitest';
import { createDatabase, withClient } from '../../../src/commands/cluster/roles';
import { TEMPLATE } from './template';

const OUTSIDE = [
	'SMTP_URL',
	'ORIGIN',
	'PORT',
	'LAB_TIME_ZONE',
	'DEMO',
	'UPLOAD_LIMIT_MB',
	'WORKERS'
];

/** A fresh copy of the migrated database for each test file, one name per vitest worker. */
const name = `w_${process.env.VITEST_POOL_ID ?? '1'}`;

function inDatabase(url: string): string {
	const changed = new URL(url);
	changed.pathname = `/${name}`;
	return changed.href;
}

const home = join(inject('testHome'), name);
rmSync(home, { recursive: true, force: true });
mkdirSync(home, { recursive: true });

await withClient(inject('superUrl'), async (client) => {
	await client.query(`DROP DATABASE IF EXISTS ${name} WITH (FORCE)`);
	await createDatabase(client, name, TEMPLATE);
});

Object.assign(process.env, {
	DATABASE_URL: inDatabase(inject('appUrl')),
	DATABASE_OWNER_URL: inDatabase(inject('ownerUrl')),
	QUARTERTURN_HOME: home,
	STORAGE_URL: join(home, 'uploads'),
	// An empty setting counts as not set: a person's own environment must not reach the tests.
	...Object.fromEntries(OUTSIDE.map((setting) => [setting, ''])),
	// Lab days must not depend on where the tests run.
	LAB_TIME_ZONE: 'UTC',
	SECRET_KEY: 'only-for-tests-0123456789abcdef'
});

// Imported late: the modules read their settings from what was just set.
afterAll(async () => {
	const { closeQueue } = await import('$lib/server/jobs/enqueue');
	const { closeDb } = await import('$lib/server/db');
	await closeQueue();
	await closeDb();
});
