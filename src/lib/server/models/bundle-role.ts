import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { BundleRoleName } from '$lib/schemas/enumerations';

/** What a bundle serves as, over a stretch of days. */
export class BundleRole extends Model<
	InferAttributes<BundleRole>,
	InferCreationAttributes<BundleRole>
> {
	declare id: CreationOptional<string>;
	declare bundleId: string;
	declare role: BundleRoleName;
	declare targetLayer: CreationOptional<string>;
	declare fromDay: string;
	declare untilDay: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		BundleRole.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				bundleId: { type: DataTypes.UUID, allowNull: false },
				role: { type: DataTypes.TEXT, allowNull: false },
				targetLayer: DataTypes.TEXT,
				fromDay: { type: DataTypes.DATEONLY, allowNull: false },
				untilDay: DataTypes.DATEONLY
			},
			{ sequelize, tableName: 'bundle_role' }
		);
	}
}
