import { parseArgs } from 'node:util';
import { Refusal } from '../bootstrap/refusal.mjs';
import { TOKEN_SCOPES, type TokenScope } from '$lib/schemas/enumerations';

export const TOKEN_CREATE_USAGE =
	'token create --email E --scope read|write --days N [--name "what for"]';

export interface TokenCreate {
	email: string;
	scope: TokenScope;
	days: number;
	name?: string;
}

export function readTokenCreate(args: string[]): TokenCreate {
	const { values } = parseArgs({
		args,
		options: {
			email: { type: 'string' },
			scope: { type: 'string' },
			days: { type: 'string' },
			name: { type: 'string' }
		}
	});
	const { email, days: daysText, name } = values;
	const scope = TOKEN_SCOPES.find((known) => known === values.scope);
	const days = Number(daysText);
	if (!email || !scope || !daysText || !Number.isInteger(days) || days < 1) {
		throw new Refusal(`Usage: npm run lab -- ${TOKEN_CREATE_USAGE}`, 2);
	}
	return { email, scope, days, ...(name ? { name } : {}) };
}

/** Prints the token alone on standard output, so that a script can keep it; it is shown this once. */
export async function tokenCreate(input: TokenCreate): Promise<void> {
	const { createByCommand } = await import('$lib/server/services/tokens');
	const { secret, expiresAt } = await createByCommand(input);
	console.log(secret);
	console.error(
		`A ${input.scope} token of ${input.email}, until ${expiresAt.toISOString().slice(0, 10)}. It is not shown again.`
	);
}
