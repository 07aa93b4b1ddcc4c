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
import type { Bundle } from './bundle';
import type { Person } from './person';
import type { SharpWave } from '$lib/schemas/enumerations';

/** What was heard or seen on a bundle at its depth of the moment. */
export class Landmark extends Model<InferAttributes<Landmark>, InferCreationAttributes<Landmark>> {
	declare id: CreationOptional<string>;
	declare bundleId: string;
	declare seenAt: Date;
	declare enteredAt: CreationOptional<Date>;
	declare personId: string;
	declare sharpWave: CreationOptional<SharpWave | null>;
	declare ripples: CreationOptional<number | null>;
	declare rippleUv: CreationOptional<number | null>;
	declare hasTheta: CreationOptional<boolean | null>;
	declare hasHash: CreationOptional<boolean | null>;
	declare hasCells: CreationOptional<boolean | null>;
	declare largestUv: CreationOptional<number | null>;
	declare signConvention: CreationOptional<string>;
	declare reference: CreationOptional<string>;
	declare note: CreationOptional<string>;
	declare isEnteredLater: CreationOptional<boolean>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;
	declare bundle?: NonAttribute<Bundle>;
	declare person?: NonAttribute<Person>;

	static define(sequelize: Sequelize): void {
		Landmark.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				bundleId: { type: DataTypes.UUID, allowNull: false },
				seenAt: { type: DataTypes.DATE, allowNull: false },
				enteredAt: DataTypes.DATE,
				personId: { type: DataTypes.UUID, allowNull: false },
				sharpWave: DataTypes.TEXT,
				ripples: DataTypes.INTEGER,
				rippleUv: DataTypes.DECIMAL,
				hasTheta: DataTypes.BOOLEAN,
				hasHash: DataTypes.BOOLEAN,
				hasCells: DataTypes.BOOLEAN,
				largestUv: DataTypes.DECIMAL,
				signConvention: DataTypes.TEXT,
				reference: DataTypes.TEXT,
				note: DataTypes.TEXT,
				isEnteredLater: DataTypes.BOOLEAN,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'landmark' }
		);
	}
}
