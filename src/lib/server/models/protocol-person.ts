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
import { inForceOn } from './in-force';
import type { Person } from './person';

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
	declare person?: NonAttribute<Person>;

	/** Ids of the people named on each protocol on a day. */
	static async namedOn(protocolIds: string[], day: string): Promise<Map<string, string[]>> {
		const rows = await ProtocolPerson.findAll({
			where: { protocolId: protocolIds, ...inForceOn(day) }
		});
		return new Map(
			protocolIds.map((id) => [
				id,
				rows.filter((row) => row.protocolId === id).map((row) => row.personId)
			])
		);
	}

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
