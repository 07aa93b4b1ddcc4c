import type { Adapter, DatabaseSession, DatabaseUser } from 'lucia';
import type { Transaction } from 'sequelize';
import { AuthSession } from '$lib/server/models/auth-session';
import { hashSecret } from './secret';

/**
 * Lucia's sessions over our table. The id in the cookie is a secret: the table keeps its hash,
 * so reading the table (or a backup) lets nobody in.
 */
export class SessionAdapter implements Adapter {
	constructor(private readonly t?: Transaction) {}

	async getSessionAndUser(
		sessionId: string
	): Promise<[DatabaseSession | null, DatabaseUser | null]> {
		const row = await AuthSession.withPerson(hashSecret(sessionId));
		if (!row) return [null, null];
		const { personId, expiresAt, name, isBlinded, roles } = row;
		return [
			{ id: sessionId, userId: personId, expiresAt, attributes: {} },
			{ id: personId, attributes: { name, isBlinded, roles } }
		];
	}

	async getUserSessions(userId: string): Promise<DatabaseSession[]> {
		const rows = await AuthSession.findAll({ where: { personId: userId } });
		return rows.map((row) => ({
			id: row.idHash,
			userId: row.personId,
			expiresAt: row.expiresAt,
			attributes: {}
		}));
	}

	async setSession({ id, userId, expiresAt, attributes }: DatabaseSession): Promise<void> {
		await AuthSession.create(
			{ idHash: hashSecret(id), personId: userId, expiresAt, ...attributes },
			{ transaction: this.t }
		);
	}

	async updateSessionExpiration(sessionId: string, expiresAt: Date): Promise<void> {
		await AuthSession.update({ expiresAt }, { where: { idHash: hashSecret(sessionId) } });
	}

	async deleteSession(sessionId: string): Promise<void> {
		await AuthSession.destroy({
			where: { idHash: hashSecret(sessionId) },
			transaction: this.t
		});
	}

	async deleteUserSessions(userId: string): Promise<void> {
		await AuthSession.destroy({ where: { personId: userId }, transaction: this.t });
	}

	async deleteExpiredSessions(): Promise<void> {
		await AuthSession.destroyExpired();
	}
}
