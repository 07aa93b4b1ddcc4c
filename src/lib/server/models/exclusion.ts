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
import type { Person } from './person';
import type { ExclusionReason } from '$lib/schemas/enumerations';

/** A unit, bundle, session or day left out, and why. */
export class Exclusion extends Model<
	InferAttributes<Exclusion>,
	InferCreationAttributes<Exclusion>
> {
	declare id: CreationOptional<string>;
	declare unitId: CreationOptional<string | null>;
	declare bundleId: CreationOptional<string | null>;
	declare sessionId: CreationOptional<string | null>;
	declare dayId: CreationOptional<string | null>;
	declare reason: ExclusionReason;
	declare note: CreationOptional<string>;
	declare wasResultSeen: boolean;
	declare personId: string;
	declare excludedAt: CreationOptional<Date>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;
	declare person?: NonAttribute<Person>;

	static define(sequelize: Sequelize): void {
		Exclusion.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				unitId: DataTypes.UUID,
				bundleId: DataTypes.UUID,
				sessionId: DataTypes.UUID,
				dayId: DataTypes.UUID,
				reason: { type: DataTypes.TEXT, allowNull: false },
				note: DataTypes.TEXT,
				wasResultSeen: { type: DataTypes.BOOLEAN, allowNull: false },
				personId: { type: DataTypes.UUID, allowNull: false },
				excludedAt: DataTypes.DATE,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'exclusion' }
		);
	}
}
