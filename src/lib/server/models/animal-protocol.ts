import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type NonAttribute,
	type Sequelize,
	type Transaction
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { Protocol } from './protocol';

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
	declare protocol?: NonAttribute<Protocol>;

	/** Animals that were ever on each protocol: a place once used is not given back. */
	static async countEver(
		protocolIds: string[],
		transaction?: Transaction
	): Promise<Map<string, number>> {
		const counts = await AnimalProtocol.count({
			where: { protocolId: protocolIds },
			group: ['protocolId'],
			distinct: true,
			col: 'animalId',
			transaction
		});
		return new Map(counts.map((row) => [String(row.protocolId), row.count]));
	}

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
