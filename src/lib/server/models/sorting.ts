import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** One person's cut of one or more sessions. */
export class Sorting extends Model<InferAttributes<Sorting>, InferCreationAttributes<Sorting>> {
	declare id: CreationOptional<string>;
	declare animalId: string;
	declare dayId: string;
	declare personId: string;
	declare program: CreationOptional<string>;
	declare programVersion: CreationOptional<string>;
	declare supersedesId: CreationOptional<string | null>;
	declare dataFileId: CreationOptional<string | null>;
	declare createdAt: CreationOptional<Date>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		Sorting.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				animalId: { type: DataTypes.UUID, allowNull: false },
				dayId: { type: DataTypes.UUID, allowNull: false },
				personId: { type: DataTypes.UUID, allowNull: false },
				program: DataTypes.TEXT,
				programVersion: DataTypes.TEXT,
				supersedesId: DataTypes.UUID,
				dataFileId: DataTypes.UUID,
				createdAt: DataTypes.DATE,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'sorting' }
		);
	}
}
