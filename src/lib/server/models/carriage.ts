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
import type { Bundle } from './bundle';

/** What one screw moves. */
export class Carriage extends Model<InferAttributes<Carriage>, InferCreationAttributes<Carriage>> {
	declare id: CreationOptional<string>;
	declare siteId: string;
	declare implantId: string;
	declare label: string;
	declare screwOrder: number;
	declare startScrewUm: CreationOptional<number>;
	declare bundles?: NonAttribute<Bundle[]>;

	static define(sequelize: Sequelize): void {
		Carriage.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				siteId: { type: DataTypes.UUID, allowNull: false },
				implantId: { type: DataTypes.UUID, allowNull: false },
				label: { type: DataTypes.TEXT, allowNull: false },
				screwOrder: { type: DataTypes.INTEGER, allowNull: false },
				startScrewUm: DataTypes.DECIMAL
			},
			{ sequelize, tableName: 'carriage' }
		);
	}
}
