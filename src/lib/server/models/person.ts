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
import type { Theme } from '$lib/schemas/enumerations';
import type { Role } from '$lib/schemas/roles';
import { db } from '$lib/server/db';

/** The roles a person `p` holds now, as an array column of a query. */
export const ROLES_OF_PERSON = `(SELECT coalesce(array_agg(g.role ORDER BY g.role), '{}')
	FROM role_grant g WHERE g.person_id = p.id AND g.revoked_at IS NULL)`;

export interface PersonWithRoles {
	id: string;
	name: string;
	email: string;
	isBlinded: boolean;
	createdAt: Date;
	deactivatedAt: Date | null;
	/** A password is set, so the person can sign in. */
	hasPassword: boolean;
	roles: Role[];
}

/** Somebody who signs in. Never removed: a deactivated person stays as author and signer. */
export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
	declare id: CreationOptional<string>;
	declare email: string;
	declare name: string;
	declare passwordHash: CreationOptional<string | null>;
	declare isBlinded: CreationOptional<boolean>;
	declare timeZone: CreationOptional<string | null>;
	declare theme: CreationOptional<Theme | null>;
	declare createdAt: CreationOptional<Date>;
	declare deactivatedAt: CreationOptional<Date | null>;
	declare revision: CreationOptional<number>;

	/** Everybody ever, active ones first, by name. */
	static withRoles(): Promise<PersonWithRoles[]> {
		return db().query<PersonWithRoles>(
			`SELECT p.id, p.name, p.email, p.is_blinded AS "isBlinded", p.created_at AS "createdAt",
				p.deactivated_at AS "deactivatedAt", p.password_hash IS NOT NULL AS "hasPassword",
				${ROLES_OF_PERSON} AS roles
			FROM person p ORDER BY p.deactivated_at IS NOT NULL, lower(p.name), p.id`,
			{ type: QueryTypes.SELECT }
		);
	}

	static define(sequelize: Sequelize): void {
		Person.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				email: { type: DataTypes.TEXT, allowNull: false },
				name: { type: DataTypes.TEXT, allowNull: false },
				passwordHash: DataTypes.TEXT,
				isBlinded: DataTypes.BOOLEAN,
				timeZone: DataTypes.TEXT,
				theme: DataTypes.TEXT,
				createdAt: DataTypes.DATE,
				deactivatedAt: DataTypes.DATE,
				revision: DataTypes.INTEGER
			},
			{ sequelize, tableName: 'person' }
		);
	}
}
