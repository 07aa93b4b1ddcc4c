import { randomBytes } from 'node:crypto';
import type { TokenScope } from '$lib/schemas/enumerations';
import type { Role } from '$lib/schemas/roles';
import { hashSecret } from '$lib/server/auth/secret';
import { db } from '$lib/server/db';
import { ApiToken } from '$lib/server/models/api-token';
import { makePerson } from '../../factories/person';

/** A token in force and the person it acts for. */
export async function makeToken({
	roles = ['experimenter'],
	scope = 'write',
	...fields
}: {
	roles?: readonly Role[];
	scope?: TokenScope;
	personId?: string;
	expiresAt?: Date;
	revokedAt?: Date;
} = {}): Promise<{ token: string; personId: string }> {
	db();
	const personId = fields.personId ?? (await makePerson({ roles })).id;
	const token = `qt_${randomBytes(24).toString('base64url')}`;
	await ApiToken.create({
		name: 'script',
		tokenHash: hashSecret(token),
		shownPrefix: token.slice(0, 6),
		scope,
		createdAt: new Date('2020-01-01T00:00:00Z'),
		expiresAt: new Date('2100-01-01T00:00:00Z'),
		...fields,
		personId
	});
	return { token, personId };
}
