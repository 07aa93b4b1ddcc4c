import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { Restriction } from '$lib/schemas/enumerations';

/** The approved permission that decides about an animal. */
export class Protocol extends Model<InferAttributes<Protocol>, InferCreationAttributes<Protocol>> {
	declare id: CreationOptional<string>;
	declare number: string;
	declare title: string;
	declare animalsAllowed: number;
	declare surgeriesAllowed: number;
	declare restriction: Restriction;
	declare weightFloorPercent: number;
	declare longestImplantDays: CreationOptional<number | null>;
	declare endPoints: CreationOptional<string>;
	declare expiresOn: string;
	declare createdAt: CreationOptional<Date>;
	declare revision: CreationOptional<number>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		Protocol.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				number: { type: DataTypes.TEXT, allowNull: false },
				title: { type: DataTypes.TEXT, allowNull: false },
				animalsAllowed: { type: DataTypes.INTEGER, allowNull: false },
				surgeriesAllowed: { type: DataTypes.INTEGER, allowNull: false },
				restriction: { type: DataTypes.TEXT, allowNull: false },
				weightFloorPercent: { type: DataTypes.DECIMAL, allowNull: false },
				longestImplantDays: DataTypes.INTEGER,
				endPoints: DataTypes.TEXT,
				expiresOn: { type: DataTypes.DATEONLY, allowNull: false },
				createdAt: DataTypes.DATE,
				revision: DataTypes.INTEGER,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'protocol' }
		);
	}
}
