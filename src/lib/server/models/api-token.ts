import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { TokenScope } from '$lib/schemas/enumerations';

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
