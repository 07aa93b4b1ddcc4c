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
import type { Animal } from './animal';
import type { Drive } from './drive';
import type { DriveDesign } from './drive-design';
import type { Person } from './person';
import type { Site } from './site';

/** A drive in an animal, from its surgery day on. */
export class Implant extends Model<InferAttributes<Implant>, InferCreationAttributes<Implant>> {
	declare id: CreationOptional<string>;
	declare animalId: string;
	declare letter: string;
	declare surgeryDay: string;
	declare surgeonId: string;
	declare driveDesignId: string;
	declare driveId: CreationOptional<string | null>;
	declare pitchUm: number;
	declare travelUm: number;
	declare backlashUm: number;
	declare smallestStepTurns: number;
	declare isClockwiseLowering: boolean;
	declare massG: CreationOptional<number | null>;
	declare note: CreationOptional<string>;
	declare createdAt: CreationOptional<Date>;
	declare revision: CreationOptional<number>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;
	declare animal?: NonAttribute<Animal>;
	declare surgeon?: NonAttribute<Person>;
	declare driveDesign?: NonAttribute<DriveDesign>;
	declare drive?: NonAttribute<Drive | null>;
	declare sites?: NonAttribute<Site[]>;

	static define(sequelize: Sequelize): void {
		Implant.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				animalId: { type: DataTypes.UUID, allowNull: false },
				letter: { type: DataTypes.TEXT, allowNull: false },
				surgeryDay: { type: DataTypes.DATEONLY, allowNull: false },
				surgeonId: { type: DataTypes.UUID, allowNull: false },
				driveDesignId: { type: DataTypes.UUID, allowNull: false },
				driveId: DataTypes.UUID,
				pitchUm: { type: DataTypes.DECIMAL, allowNull: false },
				travelUm: { type: DataTypes.DECIMAL, allowNull: false },
				backlashUm: { type: DataTypes.DECIMAL, allowNull: false },
				smallestStepTurns: { type: DataTypes.DECIMAL, allowNull: false },
				isClockwiseLowering: { type: DataTypes.BOOLEAN, allowNull: false },
				massG: DataTypes.DECIMAL,
				note: DataTypes.TEXT,
				createdAt: DataTypes.DATE,
				revision: DataTypes.INTEGER,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'implant' }
		);
	}
}
