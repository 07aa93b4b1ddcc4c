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
import type { Person } from './person';

/** One weighing; net of the implant. */
export class Weight extends Model<InferAttributes<Weight>, InferCreationAttributes<Weight>> {
	declare id: CreationOptional<string>;
	declare animalId: string;
	declare measuredAt: Date;
	declare grossG: number;
	declare implantMassG: CreationOptional<number>;
	declare netG: CreationOptional<number>;
	declare measuredBy: string;
	declare note: CreationOptional<string>;
	declare enteredAt: CreationOptional<Date>;
	declare isEnteredLater: CreationOptional<boolean>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;
	declare measurer?: NonAttribute<Person>;

	static define(sequelize: Sequelize): void {
		Weight.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				animalId: { type: DataTypes.UUID, allowNull: false },
				measuredAt: { type: DataTypes.DATE, allowNull: false },
				grossG: { type: DataTypes.DECIMAL, allowNull: false },
				implantMassG: DataTypes.DECIMAL,
				netG: DataTypes.DECIMAL,
				measuredBy: { type: DataTypes.UUID, allowNull: false },
				note: DataTypes.TEXT,
				enteredAt: DataTypes.DATE,
				isEnteredLater: DataTypes.BOOLEAN,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'weight' }
		);
	}
}
