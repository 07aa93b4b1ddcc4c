import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** The group an animal was allotted to, hidden from blinded people. */
export class SealedAllocation extends Model<
	InferAttributes<SealedAllocation>,
	InferCreationAttributes<SealedAllocation>
> {
	declare id: CreationOptional<string>;
	declare projectId: string;
	declare animalId: string;
	declare groupLabel: string;
	declare sealedAt: CreationOptional<Date>;
	declare sealedBy: string;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		SealedAllocation.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				projectId: { type: DataTypes.UUID, allowNull: false },
				animalId: { type: DataTypes.UUID, allowNull: false },
				groupLabel: { type: DataTypes.TEXT, allowNull: false },
				sealedAt: DataTypes.DATE,
				sealedBy: { type: DataTypes.UUID, allowNull: false },
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'sealed_allocation' }
		);
	}
}
