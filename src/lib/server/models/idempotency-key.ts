import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';

/** The kept answer of a POST that a script may send twice. */
export class IdempotencyKey extends Model<
	InferAttributes<IdempotencyKey>,
	InferCreationAttributes<IdempotencyKey>
> {
	declare personId: string;
	declare key: string;
	declare requestHash: string;
	declare status: number;
	declare body: unknown;
	declare createdAt: CreationOptional<Date>;

	static define(sequelize: Sequelize): void {
		IdempotencyKey.init(
			{
				personId: { type: DataTypes.UUID, primaryKey: true },
				key: { type: DataTypes.TEXT, primaryKey: true },
				requestHash: { type: DataTypes.TEXT, allowNull: false },
				status: { type: DataTypes.INTEGER, allowNull: false },
				body: { type: DataTypes.JSON, allowNull: false },
				createdAt: DataTypes.DATE
			},
			{ sequelize, tableName: 'idempotency_key' }
		);
	}
}
