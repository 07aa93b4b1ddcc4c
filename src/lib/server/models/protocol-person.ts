import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** Somebody named on a protocol. */
export class ProtocolPerson extends Model<
	InferAttributes<ProtocolPerson>,
	InferCreationAttributes<ProtocolPerson>
> {
	declare id: CreationOptional<string>;
	declare protocolId: string;
	declare personId: string;
	declare fromDay: string;
	declare untilDay: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		ProtocolPerson.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				protocolId: { type: DataTypes.UUID, allowNull: false },
				personId: { type: DataTypes.UUID, allowNull: false },
				fromDay: { type: DataTypes.DATEONLY, allowNull: false },
				untilDay: DataTypes.DATEONLY
			},
			{ sequelize, tableName: 'protocol_person' }
		);
	}
}
