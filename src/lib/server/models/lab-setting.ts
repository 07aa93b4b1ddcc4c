import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize,
	type Transaction
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** One version of one of the lab's own values. */
export class LabSetting extends Model<
	InferAttributes<LabSetting>,
	InferCreationAttributes<LabSetting>
> {
	declare id: CreationOptional<string>;
	declare key: string;
	declare version: number;
	declare value: unknown;
	declare setBy: CreationOptional<string | null>;
	declare setAt: CreationOptional<Date>;

	static latest(key: string, transaction?: Transaction): Promise<LabSetting | null> {
		return LabSetting.findOne({ where: { key }, order: [['version', 'DESC']], transaction });
	}

	static define(sequelize: Sequelize): void {
		LabSetting.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				key: { type: DataTypes.TEXT, allowNull: false },
				version: { type: DataTypes.INTEGER, allowNull: false },
				value: { type: DataTypes.JSONB, allowNull: false },
				setBy: DataTypes.UUID,
				setAt: DataTypes.DATE
			},
			{ sequelize, tableName: 'lab_setting' }
		);
	}
}
