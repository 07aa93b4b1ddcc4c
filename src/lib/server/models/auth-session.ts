import {
	DataTypes,
	Model,
	Op,
	QueryTypes,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { Role } from '$lib/schemas/roles';
import { now } from '$lib/server/clock';
import { db } from '$lib/server/db';
import { ROLES_OF_PERSON } from './person';

/** A session with what an actor is made of; never the password's hash. */
export interface SessionWithPerson {
	personId: string;
	expiresAt: Date;
	name: string;
	isBlinded: boolean;
	roles: Role[];
}

/** A signed-in browser; only a hash of its id is kept. */
export class AuthSession extends Model<
	InferAttributes<AuthSession>,
	InferCreationAttributes<AuthSession>
> {
	declare idHash: string;
	declare personId: string;
	declare createdAt: CreationOptional<Date>;
	declare expiresAt: Date;
	declare userAgent: CreationOptional<string | null>;
	declare address: CreationOptional<string | null>;

	/** Undefined also when the person is deactivated: their sessions end at that moment. */
	static async withPerson(idHash: string): Promise<SessionWithPerson | undefined> {
		const [row] = await db().query<SessionWithPerson>(
			`SELECT s.person_id AS "personId", s.expires_at AS "expiresAt", p.name,
				p.is_blinded AS "isBlinded", ${ROLES_OF_PERSON} AS roles
			FROM auth_session s JOIN person p ON p.id = s.person_id
			WHERE s.id_hash = $idHash AND p.deactivated_at IS NULL`,
			{ bind: { idHash }, type: QueryTypes.SELECT }
		);
		return row;
	}

	static async destroyExpired(): Promise<void> {
		await AuthSession.destroy({ where: { expiresAt: { [Op.lte]: now() } } });
	}

	static define(sequelize: Sequelize): void {
		AuthSession.init(
			{
				idHash: { type: DataTypes.TEXT, primaryKey: true },
				personId: { type: DataTypes.UUID, allowNull: false },
				createdAt: DataTypes.DATE,
				expiresAt: { type: DataTypes.DATE, allowNull: false },
				userAgent: DataTypes.TEXT,
				address: DataTypes.TEXT
			},
			{ sequelize, tableName: 'auth_session' }
		);
	}
}
