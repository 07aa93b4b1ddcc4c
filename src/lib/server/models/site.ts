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
import type { Carriage } from './carriage';
import type { LayerBand } from '$lib/schemas/layer-band';

/** The carriages over one target. */
export class Site extends Model<InferAttributes<Site>, InferCreationAttributes<Site>> {
	declare id: CreationOptional<string>;
	declare implantId: string;
	declare label: string;
	declare targetLayer: CreationOptional<string>;
	declare layerBands: CreationOptional<LayerBand[]>;
	declare carriages?: NonAttribute<Carriage[]>;

	static define(sequelize: Sequelize): void {
		Site.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				implantId: { type: DataTypes.UUID, allowNull: false },
				label: { type: DataTypes.TEXT, allowNull: false },
				targetLayer: DataTypes.TEXT,
				layerBands: DataTypes.JSONB
			},
			{ sequelize, tableName: 'site' }
		);
	}
}
