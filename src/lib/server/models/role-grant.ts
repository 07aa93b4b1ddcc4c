import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { Role } from '$lib/schemas/roles';

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
