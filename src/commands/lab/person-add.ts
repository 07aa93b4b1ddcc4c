import { parseArgs } from 'node:util';
import { Refusal } from '../bootstrap/refusal.mjs';
import { roleSchema, ROLES, type Role } from '$lib/schemas/roles';

export const PERSON_ADD_USAGE = 'person add --email E --name N --role R [--role R …]';

export interface PersonAdd {
	email: string;
	name: string;
	roles: Role[];
}

/** Roles may be repeated, or follow one another after blanks or commas. */
export function readPersonAdd(args: string[]): PersonAdd {
	const { values, positionals } = parseArgs({
		args,
		allowPositionals: true,
		options: {
			email: { type: 'string' },
			name: { type: 'string' },
			role: { type: 'string', multiple: true }
		}
	});
	const { email, name, role = [] } = values;
	if (!email || !name || role.length === 0) {
		throw new Refusal(`Usage: npm run lab -- ${PERSON_ADD_USAGE}`, 2);
	}
	const roles = [...role, ...positionals].flatMap((words) => words.split(',')).map(readRole);
	return { email, name, roles };
}

function readRole(word: string): Role {
	const read = roleSchema.safeParse(word.trim().toLowerCase());
	if (!read.success) {
		throw new Refusal(
			`There is no role "${word}". Nobody was added. Roles: ${ROLES.join(', ')}`,
			2
		);
	}
	return read.data;
}

/** Adds a person who chooses a password at the printed address. */
export async function personAdd(input: PersonAdd): Promise<void> {
	const { addByCommand } = await import('$lib/server/services/people');
	const { address, days } = await addByCommand(input);
	console.log(`${input.name} was added (${input.roles.join(', ')}).`);
	console.log(`They choose a password, once and within ${days} days, at\n  ${address}`);
}
