import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type NonAttribute,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { DriveDesign } from './drive-design';

/** One drive as made, with its serial. */
export class Drive extends Model<InferAttributes<Drive>, InferCreationAttributes<Drive>> {
	declare id: CreationOptional<string>;
	declare designId: string;
	declare serial: string;
	declare measuredPitchUm: CreationOptional<number | null>;
	declare massG: CreationOptional<number | null>;
	declare note: CreationOptional<string>;
	declare createdAt: CreationOptional<Date>;
	declare revision: CreationOptional<number>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;
	declare design?: NonAttribute<DriveDesign>;

	static define(sequelize: Sequelize): void {
		Drive.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				designId: { type: DataTypes.UUID, allowNull: false },
				serial: { type: DataTypes.TEXT, allowNull: false },
				measuredPitchUm: DataTypes.DECIMAL,
				massG: DataTypes.DECIMAL,
				note: DataTypes.TEXT,
				createdAt: DataTypes.DATE,
				revision: DataTypes.INTEGER,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'drive' }
		);
	}
}
