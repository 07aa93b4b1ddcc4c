import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** Days an animal spends on a protocol. */
export class AnimalProtocol extends Model<
	InferAttributes<AnimalProtocol>,
	InferCreationAttributes<AnimalProtocol>
> {
	declare id: CreationOptional<string>;
	declare animalId: string;
	declare protocolId: string;
	declare fromDay: string;
	declare untilDay: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		AnimalProtocol.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				animalId: { type: DataTypes.UUID, allowNull: false },
				protocolId: { type: DataTypes.UUID, allowNull: false },
				fromDay: { type: DataTypes.DATEONLY, allowNull: false },
				untilDay: DataTypes.DATEONLY
			},
			{ sequelize, tableName: 'animal_protocol' }
		);
	}
}
