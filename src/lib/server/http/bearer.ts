import type { Actor } from '$lib/server/access';
import { takeTry } from '$lib/server/auth/rate-limits';
import { Unauthenticated } from '$lib/server/errors';
import * as tokens from '$lib/server/services/tokens';

/**
 * Who the call's token acts for. Only the token counts: a browser's cookie opens no call, so no
 * other site can make a signed-in person's browser write.
 * @throws Unauthenticated, TooMany
 */
export async function bearer(request: Request): Promise<Actor> {
	const sent = request.headers.get('authorization');
	if (sent === null) {
		throw new Unauthenticated('Send a token: Authorization: Bearer …. Make one on your profile.');
	}
	const secret = /^Bearer +([^ ]+)$/i.exec(sent)?.[1];
	const by = secret === undefined ? null : await tokens.actorFor(secret);
	if (!secret || !by) {
		throw new Unauthenticated(
			'This token is not known, has expired or was revoked. Make a new one on your profile.'
		);
	}
	await takeTry('api-token', secret);
	return by;
}
