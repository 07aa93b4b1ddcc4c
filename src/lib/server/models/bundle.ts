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
import type { BundleRole } from './bundle-role';
import type { Carriage } from './carriage';
import type { Channel } from './channel';
import type { BundleKind, DepthZero } from '$lib/schemas/enumerations';

/** A tetrode, stereotrode, single wire or probe shank. */
export class Bundle extends Model<InferAttributes<Bundle>, InferCreationAttributes<Bundle>> {
	declare id: CreationOptional<string>;
	declare carriageId: string;
	declare implantId: string;
	declare label: string;
	declare kind: BundleKind;
	declare entryApMm: CreationOptional<number | null>;
	declare entryMlMm: CreationOptional<number | null>;
	declare tiltDeg: CreationOptional<number>;
	declare azimuthDeg: CreationOptional<number>;
	declare startDepthUm: CreationOptional<number>;
	declare zero: CreationOptional<DepthZero>;
	declare zeroUncertaintyUm: CreationOptional<number | null>;
	declare carriage?: NonAttribute<Carriage>;
	declare roles?: NonAttribute<BundleRole[]>;
	declare channels?: NonAttribute<Channel[]>;

	static define(sequelize: Sequelize): void {
		Bundle.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				carriageId: { type: DataTypes.UUID, allowNull: false },
				implantId: { type: DataTypes.UUID, allowNull: false },
				label: { type: DataTypes.TEXT, allowNull: false },
				kind: { type: DataTypes.TEXT, allowNull: false },
				entryApMm: DataTypes.DECIMAL,
				entryMlMm: DataTypes.DECIMAL,
				tiltDeg: DataTypes.DECIMAL,
				azimuthDeg: DataTypes.DECIMAL,
				startDepthUm: DataTypes.DECIMAL,
				zero: DataTypes.TEXT,
				zeroUncertaintyUm: DataTypes.DECIMAL
			},
			{ sequelize, tableName: 'bundle' }
		);
	}
}
