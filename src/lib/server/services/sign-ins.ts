import { Op } from 'sequelize';
import type { Cookie } from 'lucia';
import { demand, personOf, type Actor } from '$lib/server/access';
import { lucia } from '$lib/server/auth/lucia';
import { isPassword } from '$lib/server/auth/password';
import { clearOldTries, forgive, giveBackTry, takeTry } from '$lib/server/auth/rate-limits';
import { hashSecret } from '$lib/server/auth/secret';
import { now } from '$lib/server/clock';
import { Invalid, NotFound } from '$lib/server/errors';
import { AuthSession } from '$lib/server/models/auth-session';
import { Person } from '$lib/server/models/person';
import { record, type Write } from '$lib/server/record';
import type { SignIn } from '$lib/schemas/sign-in';

/** Where a request comes from, as the person's own list of browsers shows it. */
export interface Origin {
	address: string;
	userAgent: string | null;
}

export interface SignedInBrowser {
	/** Hash of the session's id: names the row, opens nothing. */
	key: string;
	createdAt: Date;
	expiresAt: Date;
	userAgent: string | null;
	address: string | null;
	isThisOne: boolean;
}

/** One answer for an unknown address, a wrong password and a deactivated person. */
const WRONG = 'The mail address or the password is not right.';

/** @returns the cookie to set. @throws Invalid, TooMany */
export async function signIn({ email, password }: SignIn, from: Origin): Promise<Cookie> {
	await takeTry('sign-in-address', from.address);
	await takeTry('sign-in-account', email);
	const person = await Person.findOne({ where: { email, deactivatedAt: null } });
	const isRight = await isPassword(person?.passwordHash ?? null, password);
	if (!person || !isRight)
		throw new Invalid([{ field: '', message: WRONG }], WRONG, 'wrong-sign-in');
	await forgive('sign-in-account', email);
	await giveBackTry('sign-in-address', from.address);
	return start(person, from);
}

/** Opens a session for somebody who has just shown who they are. */
export async function start(person: { id: string; name: string }, from: Origin): Promise<Cookie> {
	const by: Actor = {
		personId: person.id,
		name: person.name,
		roles: new Set(),
		isBlinded: false,
		via: 'page',
		scope: 'write'
	};
	return record(by, async (w) => {
		const sessions = lucia(w.t);
		const session = await sessions.createSession(person.id, {
			address: from.address,
			userAgent: from.userAgent?.slice(0, 300) ?? null
		});
		await w.log('person.signed-in', { kind: 'person', id: person.id });
		return sessions.createSessionCookie(session.id);
	});
}

/** Who a cookie stands for, and the cookie to set when the session was extended or has ended. */
export async function read(
	sessionId: string
): Promise<{ actor: Actor | null; cookie: Cookie | null }> {
	const sessions = lucia();
	const { user, session } = await sessions.validateSession(sessionId);
	if (!user) return { actor: null, cookie: sessions.createBlankSessionCookie() };
	return {
		actor: {
			personId: user.id,
			name: user.name,
			roles: new Set(user.roles),
			isBlinded: user.isBlinded,
			via: 'page',
			scope: 'write'
		},
		cookie: session.fresh ? sessions.createSessionCookie(session.id) : null
	};
}

/** @returns the blank cookie to set */
export async function signOut(by: Actor, sessionId: string): Promise<Cookie> {
	return record(by, async (w) => {
		const sessions = lucia(w.t);
		await sessions.invalidateSession(sessionId);
		await w.log('person.signed-out', { kind: 'person', id: by.personId });
		return sessions.createBlankSessionCookie();
	});
}

/** The reader's own signed-in browsers, the newest first. */
export async function list(by: Actor | null, sessionId: string | null): Promise<SignedInBrowser[]> {
	demand(by, 'own.read');
	const rows = await AuthSession.findAll({
		where: { personId: personOf(by), expiresAt: { [Op.gt]: now() } },
		order: [['createdAt', 'DESC']]
	});
	const mine = sessionId && hashSecret(sessionId);
	return rows.map(({ idHash, createdAt, expiresAt, userAgent, address }) => ({
		key: idHash,
		createdAt,
		expiresAt,
		userAgent,
		address,
		isThisOne: idHash === mine
	}));
}

export async function end(by: Actor | null, key: string): Promise<void> {
	demand(by, 'own.write');
	const personId = personOf(by);
	await record(by, async (w) => {
		const ended = await AuthSession.destroy({
			where: { idHash: key, personId },
			transaction: w.t
		});
		if (ended === 0) throw new NotFound('This browser is signed out already.');
		await w.log('person.browser-signed-out', { kind: 'person', id: personId });
	});
}

/** Signs the reader out everywhere but in the browser they ask from. */
export async function endOthers(by: Actor | null, sessionId: string | null): Promise<number> {
	demand(by, 'own.write');
	const personId = personOf(by);
	return record(by, async (w) => {
		const ended = await endAll(w, personId, sessionId);
		await w.log('person.signed-out-everywhere', { kind: 'person', id: personId }, { ended });
		return ended;
	});
}

/** Ends a person's sessions as part of a write; `keep` is the id of the one that stays. */
export async function endAll(w: Write, personId: string, keep: string | null): Promise<number> {
	return AuthSession.destroy({
		where: { personId, ...(keep && { idHash: { [Op.ne]: hashSecret(keep) } }) },
		transaction: w.t
	});
}

/** Clears what has run out; asked at the start of a process. */
export async function sweep(): Promise<void> {
	await lucia().deleteExpiredSessions();
	await clearOldTries();
}
