import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** Where an animal runs, with its measures. */
export class Arena extends Model<InferAttributes<Arena>, InferCreationAttributes<Arena>> {
	declare id: CreationOptional<string>;
	declare name: string;
	declare description: string;
	declare binCm: CreationOptional<number>;
	declare pxPerCm: CreationOptional<number | null>;
	declare endAX: CreationOptional<number | null>;
	declare endAY: CreationOptional<number | null>;
	declare endBX: CreationOptional<number | null>;
	declare endBY: CreationOptional<number | null>;
	declare note: CreationOptional<string>;
	declare createdAt: CreationOptional<Date>;
	declare revision: CreationOptional<number>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		Arena.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				name: { type: DataTypes.TEXT, allowNull: false },
				description: { type: DataTypes.TEXT, allowNull: false },
				binCm: DataTypes.DECIMAL,
				pxPerCm: DataTypes.DECIMAL,
				endAX: DataTypes.DECIMAL,
				endAY: DataTypes.DECIMAL,
				endBX: DataTypes.DECIMAL,
				endBY: DataTypes.DECIMAL,
				note: DataTypes.TEXT,
				createdAt: DataTypes.DATE,
				revision: DataTypes.INTEGER,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'arena' }
		);
	}
}
