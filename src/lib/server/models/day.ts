import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { DayState } from '$lib/schemas/enumerations';

/** One lab day of one animal. */
export class Day extends Model<InferAttributes<Day>, InferCreationAttributes<Day>> {
	declare id: CreationOptional<string>;
	declare animalId: string;
	declare date: string;
	declare state: CreationOptional<DayState>;
	declare responsibleId: CreationOptional<string | null>;
	declare createdAt: CreationOptional<Date>;

	static define(sequelize: Sequelize): void {
		Day.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				animalId: { type: DataTypes.UUID, allowNull: false },
				date: { type: DataTypes.DATEONLY, allowNull: false },
				state: DataTypes.TEXT,
				responsibleId: DataTypes.UUID,
				createdAt: DataTypes.DATE
			},
			{ sequelize, tableName: 'day' }
		);
	}
}
