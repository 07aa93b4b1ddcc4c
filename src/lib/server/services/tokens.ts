import { z } from 'zod';
import { TOKEN_SCOPES, type TokenScope } from '$lib/schemas/enumerations';
import { mailAddressSchema } from '$lib/schemas/mail-address';
import { tokenSchema, type NewToken } from '$lib/schemas/people';
import { demand, may, personOf, systemActor, type Actor } from '$lib/server/access';
import { hashSecret, newSecret } from '$lib/server/auth/secret';
import { now } from '$lib/server/clock';
import { Conflict, Forbidden, Invalid, NotFound } from '$lib/server/errors';
import { ApiToken, type TokenRow } from '$lib/server/models/api-token';
import { Person } from '$lib/server/models/person';
import { parsed } from '$lib/server/parsed';
import { record } from '$lib/server/record';

/** The prefix tells people, and programs that look for leaked keys, what this is. */
const PREFIX = 'qt_';

export interface Token extends TokenRow {
	state: 'in-force' | 'expired' | 'revoked';
}

export interface FreshToken {
	id: string;
	/** Shown once; the database keeps a hash. */
	secret: string;
	expiresAt: Date;
}

/** Who a token acts for, or null when it is unknown, expired, revoked or its owner deactivated. */
export async function actorFor(secret: string | null): Promise<Actor | null> {
	if (!secret) return null;
	const row = await ApiToken.withPerson(hashSecret(secret));
	if (!row) return null;
	await ApiToken.markUsed(row.tokenId);
	return {
		personId: row.personId,
		name: row.name,
		roles: new Set(row.roles),
		isBlinded: row.isBlinded,
		via: 'token',
		scope: row.scope
	};
}

/** The reader's own tokens, the newest first. */
export async function list(by: Actor | null): Promise<Token[]> {
	demand(by, 'own.read');
	return (await ApiToken.ofPeople(personOf(by))).map(withState);
}

/** Everybody's tokens. */
export async function listAll(by: Actor | null): Promise<Token[]> {
	demand(by, 'tokens.others');
	return (await ApiToken.ofPeople()).map(withState);
}

export async function create(by: Actor | null, input: NewToken): Promise<FreshToken> {
	demand(by, 'own.write');
	// A token that makes tokens would outlive its own end.
	if (by.via === 'token')
		throw new Forbidden('Tokens are made on the profile page, not by a token.');
	return make(by, personOf(by), parsed(tokenSchema, input));
}

const commandSchema = z.object({
	email: mailAddressSchema,
	name: z.string().trim().min(1).max(120).default('Made on the command line'),
	scope: z.enum(TOKEN_SCOPES),
	days: tokenSchema.shape.days
});

/** For `lab token create`, run on the lab's own machine. */
export async function createByCommand(input: z.input<typeof commandSchema>): Promise<FreshToken> {
	const by = systemActor('command');
	demand(by, 'tokens.others');
	const { email, ...token } = parsed(commandSchema, input);
	const person = await Person.findOne({ where: { email, deactivatedAt: null } });
	if (!person) {
		throw new Invalid([
			{ field: 'email', message: `No active person has the mail address ${email}.` }
		]);
	}
	return make(by, person.id, token);
}

export async function revoke(by: Actor | null, id: string): Promise<void> {
	demand(by, 'own.write');
	await record(by, async (w) => {
		const token = await ApiToken.findByPk(id, { transaction: w.t, lock: true });
		const isOwn = token?.personId === by.personId;
		if (!token || (!isOwn && !may(by, 'tokens.others'))) throw new NotFound();
		if (token.revokedAt) throw new Conflict('revoked', 'This token is revoked already.');
		await token.update({ revokedAt: now(), revokedBy: by.personId }, { transaction: w.t });
		await w.log('token.revoked', { kind: 'api-token', id }, { of: token.personId });
	});
}

async function make(
	by: Actor,
	personId: string,
	{ name, scope, days }: { name: string; scope: TokenScope; days: number }
): Promise<FreshToken> {
	const secret = PREFIX + newSecret();
	const createdAt = now();
	const expiresAt = new Date(createdAt.getTime() + days * 24 * 60 * 60 * 1000);
	return record(by, async (w) => {
		const { id } = await ApiToken.create(
			{
				personId,
				name,
				scope,
				tokenHash: hashSecret(secret),
				shownPrefix: secret.slice(0, PREFIX.length + 5),
				createdAt,
				createdBy: by.personId,
				expiresAt
			},
			{ transaction: w.t }
		);
		await w.log('token.made', { kind: 'api-token', id }, { of: personId, scope, days });
		return { id, secret, expiresAt };
	});
}

function withState(row: TokenRow): Token {
	const state = row.revokedAt ? 'revoked' : row.expiresAt <= now() ? 'expired' : 'in-force';
	return { ...row, state };
}
