import type { Actor } from '$lib/server/access';
import { hashSecret } from '$lib/server/auth/secret';
import { ApiToken } from '$lib/server/models/api-token';

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
