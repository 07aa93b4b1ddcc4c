import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** A one-time way back in. */
export class PasswordReset extends Model<
	InferAttributes<PasswordReset>,
	InferCreationAttributes<PasswordReset>
> {
	declare id: CreationOptional<string>;
	declare personId: string;
	declare tokenHash: string;
	declare createdAt: CreationOptional<Date>;
	declare expiresAt: Date;
	declare usedAt: CreationOptional<Date | null>;

	static define(sequelize: Sequelize): void {
		PasswordReset.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				personId: { type: DataTypes.UUID, allowNull: false },
				tokenHash: { type: DataTypes.TEXT, allowNull: false },
				createdAt: DataTypes.DATE,
				expiresAt: { type: DataTypes.DATE, allowNull: false },
				usedAt: DataTypes.DATE
			},
			{ sequelize, tableName: 'password_reset' }
		);
	}
}
