import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** A recording place with its usual settings. */
export class Rig extends Model<InferAttributes<Rig>, InferCreationAttributes<Rig>> {
	declare id: CreationOptional<string>;
	declare name: string;
	declare place: CreationOptional<string>;
	declare reference: CreationOptional<string>;
	declare ground: CreationOptional<string>;
	declare filters: CreationOptional<string>;
	declare gain: CreationOptional<string>;
	declare headstageSerial: CreationOptional<string>;
	declare note: CreationOptional<string>;
	declare createdAt: CreationOptional<Date>;
	declare revision: CreationOptional<number>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		Rig.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				name: { type: DataTypes.TEXT, allowNull: false },
				place: DataTypes.TEXT,
				reference: DataTypes.TEXT,
				ground: DataTypes.TEXT,
				filters: DataTypes.TEXT,
				gain: DataTypes.TEXT,
				headstageSerial: DataTypes.TEXT,
				note: DataTypes.TEXT,
				createdAt: DataTypes.DATE,
				revision: DataTypes.INTEGER,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'rig' }
		);
	}
}
