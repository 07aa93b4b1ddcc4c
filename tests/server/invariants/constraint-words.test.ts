import { describe, expect, it } from 'vitest';
import { CONSTRAINT_WORDS } from '$lib/server/constraints';
import { ask } from './catalogue';

/** Keys no person can run into: the product draws the values, or finds the row before making it. */
const OUT_OF_REACH = [
	'analysis_immutable',
	'api_token_token_hash_key',
	'day_animal_id_date_key',
	'invitation_token_hash_key',
	'lab_setting_key_version_key',
	'log_hash_key',
	'outbox_dedupe_key_key',
	'password_reset_token_hash_key',
	'unit_label_key'
];

/** Unique, exclusion and named check constraints, and the names that triggers raise. */
async function namesInDatabase(): Promise<string[]> {
	const rows = await ask<{ name: string }>(
		`SELECT conname::text AS name FROM pg_constraint
			WHERE connamespace = 'public'::regnamespace AND (contype IN ('u', 'x')
			OR (contype = 'c' AND conname !~ '_check[0-9]*$'))
		UNION SELECT indexrelid::regclass::text FROM pg_index JOIN pg_class c ON c.oid = indexrelid
			WHERE indisunique AND NOT indisprimary AND c.relnamespace = 'public'::regnamespace
		UNION SELECT (regexp_matches(prosrc, 'CONSTRAINT = ''(\\w+)''', 'g'))[1] FROM pg_proc
			WHERE pronamespace = 'public'::regnamespace
		UNION SELECT tgrelid::regclass::text || '_immutable' FROM pg_trigger
			WHERE tgfoid = 'refuse_change'::regproc`
	);
	return rows.map(({ name }) => name);
}

describe('the words for constraints', () => {
	it('name constraints that the database has', async () => {
		const names = await namesInDatabase();
		for (const name of Object.keys(CONSTRAINT_WORDS)) expect(names).toContain(name);
	});

	it('exist for every constraint that a person can run into', async () => {
		const explained = new Set([...Object.keys(CONSTRAINT_WORDS), ...OUT_OF_REACH]);
		expect((await namesInDatabase()).filter((name) => !explained.has(name))).toEqual([]);
	});

	it('say what happened in a sentence', () => {
		for (const [code, message] of Object.values(CONSTRAINT_WORDS)) {
			expect(code).toMatch(/^[a-z]+(-[a-z]+)*$/);
			expect(message).toMatch(/^[A-Z].*\.$/);
		}
	});
});
