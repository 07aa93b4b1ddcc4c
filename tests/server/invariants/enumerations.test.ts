import { describe, expect, it } from 'vitest';
import * as enumerations from '$lib/schemas/enumerations';
import { ROLES } from '$lib/schemas/roles';
import { ask } from './catalogue';

/** Where the database checks each list; `invitation.roles` holds several of one list. */
const CHECKED: Record<string, readonly string[]> = {
	'person.theme': enumerations.THEMES,
	'role_grant.role': ROLES,
	'invitation.roles': ROLES,
	'api_token.scope': enumerations.TOKEN_SCOPES,
	'protocol.restriction': enumerations.RESTRICTIONS,
	'animal.species': enumerations.SPECIES,
	'animal.sex': enumerations.SEXES,
	'animal.status': enumerations.ANIMAL_STATUSES,
	'bundle.kind': enumerations.BUNDLE_KINDS,
	'bundle.zero': enumerations.DEPTH_ZEROS,
	'bundle_role.role': enumerations.BUNDLE_ROLES,
	'landmark.sharp_wave': enumerations.SHARP_WAVES,
	'day.state': enumerations.DAY_STATES,
	'epoch.kind': enumerations.EPOCH_KINDS,
	'tally.source': enumerations.TALLY_SOURCES,
	'tally.moment': enumerations.TALLY_MOMENTS,
	'data_file.kind': enumerations.DATA_KINDS,
	'data_file.format': enumerations.DATA_FORMATS,
	'data_file.state': enumerations.DATA_STATES,
	'unit.class': enumerations.UNIT_CLASSES,
	'analysis.state': enumerations.ANALYSIS_STATES,
	'exclusion.reason': enumerations.EXCLUSION_REASONS,
	'log.via': ['page', 'token', 'command', 'system']
};

const LIST = /\(?(\w+) (?:=|<@) (?:ANY \()?\(?ARRAY\[([^\]]*)\]/;

async function listsInDatabase(): Promise<Map<string, string[]>> {
	const rows = await ask<{ table: string; rule: string }>(
		`SELECT conrelid::regclass::text AS table, pg_get_constraintdef(oid) AS rule
		FROM pg_constraint WHERE contype = 'c' AND connamespace = 'public'::regnamespace`
	);
	const lists = new Map<string, string[]>();
	for (const { table, rule } of rows) {
		const found = LIST.exec(rule);
		if (!found) continue;
		const words = [...found[2].matchAll(/'([^']*)'::text/g)].map(([, word]) => word);
		lists.set(`${table}.${found[1]}`, words);
	}
	return lists;
}

describe('closed lists of words', () => {
	it('are the same in code and in the database, none missing on either side', async () => {
		const lists = await listsInDatabase();
		expect([...lists.keys()].sort()).toEqual(Object.keys(CHECKED).sort());
		for (const [column, words] of Object.entries(CHECKED)) {
			expect([...(lists.get(column) ?? [])].sort(), column).toEqual([...words].sort());
		}
	});

	it('covers every list that code exports', () => {
		const exported = Object.values(enumerations);
		const used = Object.values(CHECKED);
		for (const list of exported) expect(used).toContain(list);
	});
});
