import {
	DataTypes,
	Model,
	QueryTypes,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize,
	type Transaction
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { Role } from '$lib/schemas/roles';
import { db } from '$lib/server/db';

/** A role a person holds or held. */
export class RoleGrant extends Model<
	InferAttributes<RoleGrant>,
	InferCreationAttributes<RoleGrant>
> {
	declare id: CreationOptional<string>;
	declare personId: string;
	declare role: Role;
	declare grantedAt: CreationOptional<Date>;
	declare grantedBy: CreationOptional<string | null>;
	declare revokedAt: CreationOptional<Date | null>;
	declare revokedBy: CreationOptional<string | null>;

	/**
	 * The active PIs, held until the transaction ends: of two people who remove each other at once,
	 * the second waits and then finds only one left.
	 */
	static async holdPis(transaction: Transaction): Promise<string[]> {
		const rows = await db().query<{ id: string }>(
			`SELECT p.id FROM role_grant g JOIN person p ON p.id = g.person_id
			WHERE g.role = 'pi' AND g.revoked_at IS NULL AND p.deactivated_at IS NULL
			ORDER BY p.id FOR UPDATE`,
			{ type: QueryTypes.SELECT, transaction }
		);
		return rows.map((row) => row.id);
	}

	static define(sequelize: Sequelize): void {
		RoleGrant.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				personId: { type: DataTypes.UUID, allowNull: false },
				role: { type: DataTypes.TEXT, allowNull: false },
				grantedAt: DataTypes.DATE,
				grantedBy: DataTypes.UUID,
				revokedAt: DataTypes.DATE,
				revokedBy: DataTypes.UUID
			},
			{ sequelize, tableName: 'role_grant' }
		);
	}
}
