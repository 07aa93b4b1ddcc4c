import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** One electrode of a bundle. */
export class Channel extends Model<InferAttributes<Channel>, InferCreationAttributes<Channel>> {
	declare id: CreationOptional<string>;
	declare bundleId: string;
	declare number: number;
	declare label: CreationOptional<string>;
	declare shankXUm: CreationOptional<number | null>;
	declare shankYUm: CreationOptional<number | null>;

	static define(sequelize: Sequelize): void {
		Channel.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				bundleId: { type: DataTypes.UUID, allowNull: false },
				number: { type: DataTypes.INTEGER, allowNull: false },
				label: DataTypes.TEXT,
				shankXUm: DataTypes.DECIMAL,
				shankYUm: DataTypes.DECIMAL
			},
			{ sequelize, tableName: 'channel' }
		);
	}
}
