import {
	DataTypes,
	Model,
	QueryTypes,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { TokenScope } from '$lib/schemas/enumerations';
import type { Role } from '$lib/schemas/roles';
import { now } from '$lib/server/clock';
import { db } from '$lib/server/db';
import { ROLES_OF_PERSON } from './person';

/** A token with what an actor is made of. */
export interface TokenWithPerson {
	tokenId: string;
	personId: string;
	scope: TokenScope;
	name: string;
	isBlinded: boolean;
	roles: Role[];
}

/** A token as its owner, a PI or an admin sees it. */
export interface TokenRow {
	id: string;
	name: string;
	shownPrefix: string;
	scope: TokenScope;
	createdAt: Date;
	expiresAt: Date;
	lastUsedAt: Date | null;
	revokedAt: Date | null;
	personId: string;
	personName: string;
}

/** A script's key; only a hash is kept. */
export class ApiToken extends Model<InferAttributes<ApiToken>, InferCreationAttributes<ApiToken>> {
	declare id: CreationOptional<string>;
	declare personId: string;
	declare name: string;
	declare tokenHash: string;
	declare shownPrefix: string;
	declare scope: TokenScope;
	declare createdAt: CreationOptional<Date>;
	declare createdBy: CreationOptional<string | null>;
	declare expiresAt: Date;
	declare lastUsedAt: CreationOptional<Date | null>;
	declare revokedAt: CreationOptional<Date | null>;
	declare revokedBy: CreationOptional<string | null>;

	/** Only a token in force of an active person. */
	static async withPerson(tokenHash: string): Promise<TokenWithPerson | undefined> {
		const [row] = await db().query<TokenWithPerson>(
			`SELECT t.id AS "tokenId", t.person_id AS "personId", t.scope, p.name,
				p.is_blinded AS "isBlinded", ${ROLES_OF_PERSON} AS roles
			FROM api_token t JOIN person p ON p.id = t.person_id
			WHERE t.token_hash = $tokenHash AND t.revoked_at IS NULL AND t.expires_at > $at
				AND p.deactivated_at IS NULL`,
			{ bind: { tokenHash, at: now().toISOString() }, type: QueryTypes.SELECT }
		);
		return row;
	}

	/** The newest first; one person's, or everybody's. */
	static ofPeople(personId: string | null = null): Promise<TokenRow[]> {
		return db().query<TokenRow>(
			`SELECT t.id, t.name, t.shown_prefix AS "shownPrefix", t.scope,
				t.created_at AS "createdAt", t.expires_at AS "expiresAt",
				t.last_used_at AS "lastUsedAt", t.revoked_at AS "revokedAt",
				t.person_id AS "personId", p.name AS "personName"
			FROM api_token t JOIN person p ON p.id = t.person_id
			WHERE $personId::uuid IS NULL OR t.person_id = $personId
			ORDER BY t.id DESC`,
			{ bind: { personId }, type: QueryTypes.SELECT }
		);
	}

	/** To the minute: a script that calls a thousand times must not write a thousand times. */
	static async markUsed(id: string): Promise<void> {
		await db().query(
			`UPDATE api_token SET last_used_at = $at WHERE id = $id
			AND (last_used_at IS NULL OR last_used_at < $at::timestamptz - interval '1 minute')`,
			{ bind: { id, at: now().toISOString() } }
		);
	}

	static define(sequelize: Sequelize): void {
		ApiToken.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				personId: { type: DataTypes.UUID, allowNull: false },
				name: { type: DataTypes.TEXT, allowNull: false },
				tokenHash: { type: DataTypes.TEXT, allowNull: false },
				shownPrefix: { type: DataTypes.TEXT, allowNull: false },
				scope: { type: DataTypes.TEXT, allowNull: false },
				createdAt: DataTypes.DATE,
				createdBy: DataTypes.UUID,
				expiresAt: { type: DataTypes.DATE, allowNull: false },
				lastUsedAt: DataTypes.DATE,
				revokedAt: DataTypes.DATE,
				revokedBy: DataTypes.UUID
			},
			{ sequelize, tableName: 'api_token' }
		);
	}
}
