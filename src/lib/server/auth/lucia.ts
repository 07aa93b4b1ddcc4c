import { Lucia, TimeSpan } from 'lucia';
import type { Transaction } from 'sequelize';
import type { Role } from '$lib/schemas/roles';
import { settings } from '$lib/server/settings';
import { SessionAdapter } from './session-adapter';

declare module 'lucia' {
	interface Register {
		Lucia: ReturnType<typeof lucia>;
		DatabaseUserAttributes: { name: string; isBlinded: boolean; roles: Role[] };
		DatabaseSessionAttributes: { userAgent?: string | null; address?: string | null };
	}
}

/**
 * Sign-in sessions of thirty days that slide: use in their second half starts them anew.
 * Made per call, which costs nothing, so that a session can be part of the caller's transaction.
 */
export function lucia(t?: Transaction) {
	return new Lucia(new SessionAdapter(t), {
		sessionExpiresIn: new TimeSpan(30, 'd'),
		sessionCookie: {
			name: 'quarterturn_session',
			attributes: {
				sameSite: 'lax',
				// A lab's own server often has no certificate; a secure cookie would be dropped there.
				secure: settings().origin.startsWith('https:')
			}
		},
		getUserAttributes: ({ name, isBlinded, roles }) => ({ name, isBlinded, roles })
	});
}
