import {
	DataTypes,
	Model,
	Op,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { Role } from '$lib/schemas/roles';

/** In place of an address: the one-time way in for the first PI of an empty lab. No `@`, so never mail. */
export const FIRST_PI = 'first-pi';

/** A place in the lab offered by mail. */
export class Invitation extends Model<
	InferAttributes<Invitation>,
	InferCreationAttributes<Invitation>
> {
	declare id: CreationOptional<string>;
	declare email: string;
	declare name: string;
	declare roles: Role[];
	declare tokenHash: string;
	declare invitedBy: CreationOptional<string | null>;
	declare createdAt: CreationOptional<Date>;
	declare expiresAt: Date;
	declare acceptedAt: CreationOptional<Date | null>;
	declare acceptedBy: CreationOptional<string | null>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;

	static open(): Promise<Invitation[]> {
		return Invitation.findAll({
			where: { acceptedAt: null, withdrawnAt: null, email: { [Op.ne]: FIRST_PI } },
			order: [['createdAt', 'DESC']]
		});
	}

	static define(sequelize: Sequelize): void {
		Invitation.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				email: { type: DataTypes.TEXT, allowNull: false },
				name: { type: DataTypes.TEXT, allowNull: false },
				roles: { type: DataTypes.ARRAY(DataTypes.TEXT), allowNull: false },
				tokenHash: { type: DataTypes.TEXT, allowNull: false },
				invitedBy: DataTypes.UUID,
				createdAt: DataTypes.DATE,
				expiresAt: { type: DataTypes.DATE, allowNull: false },
				acceptedAt: DataTypes.DATE,
				acceptedBy: DataTypes.UUID,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID
			},
			{ sequelize, tableName: 'invitation' }
		);
	}
}
