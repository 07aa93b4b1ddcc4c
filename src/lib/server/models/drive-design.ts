import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** A kind of drive: thread, travel, slack. */
export class DriveDesign extends Model<
	InferAttributes<DriveDesign>,
	InferCreationAttributes<DriveDesign>
> {
	declare id: CreationOptional<string>;
	declare name: string;
	declare thread: CreationOptional<string>;
	declare pitchUm: number;
	declare travelMm: number;
	declare smallestStepTurns: number;
	declare backlashUm: CreationOptional<number>;
	declare isClockwiseLowering: CreationOptional<boolean>;
	declare note: CreationOptional<string>;
	declare createdAt: CreationOptional<Date>;
	declare revision: CreationOptional<number>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		DriveDesign.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				name: { type: DataTypes.TEXT, allowNull: false },
				thread: DataTypes.TEXT,
				pitchUm: { type: DataTypes.DECIMAL, allowNull: false },
				travelMm: { type: DataTypes.DECIMAL, allowNull: false },
				smallestStepTurns: { type: DataTypes.DECIMAL, allowNull: false },
				backlashUm: DataTypes.DECIMAL,
				isClockwiseLowering: DataTypes.BOOLEAN,
				note: DataTypes.TEXT,
				createdAt: DataTypes.DATE,
				revision: DataTypes.INTEGER,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'drive_design' }
		);
	}
}
