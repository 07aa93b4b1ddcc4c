import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';

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
