import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { UnitClass } from '$lib/schemas/enumerations';

/** One label of one sorting with its spikes. */
export class Unit extends Model<InferAttributes<Unit>, InferCreationAttributes<Unit>> {
	declare id: CreationOptional<string>;
	declare sortingId: string;
	declare label: string;
	declare bundleLabel: CreationOptional<string | null>;
	declare bundleId: CreationOptional<string | null>;
	declare class: CreationOptional<UnitClass | null>;
	declare amplitudeUv: CreationOptional<number | null>;
	declare noiseUv: CreationOptional<number | null>;
	declare spikeCount: number;
	declare firstSpikeS: CreationOptional<number | null>;
	declare lastSpikeS: CreationOptional<number | null>;
	declare spikes: Buffer;

	static define(sequelize: Sequelize): void {
		Unit.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				sortingId: { type: DataTypes.UUID, allowNull: false },
				label: { type: DataTypes.TEXT, allowNull: false },
				bundleLabel: DataTypes.TEXT,
				bundleId: DataTypes.UUID,
				class: DataTypes.TEXT,
				amplitudeUv: DataTypes.DECIMAL,
				noiseUv: DataTypes.DECIMAL,
				spikeCount: { type: DataTypes.INTEGER, allowNull: false },
				firstSpikeS: DataTypes.DOUBLE,
				lastSpikeS: DataTypes.DOUBLE,
				spikes: { type: DataTypes.BLOB, allowNull: false }
			},
			{ sequelize, tableName: 'unit' }
		);
	}
}
