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
import type { TallyMoment, TallySource } from '$lib/schemas/enumerations';

/** A count of units on a bundle: a person's, or read off a sorting. */
export class Tally extends Model<InferAttributes<Tally>, InferCreationAttributes<Tally>> {
	declare id: CreationOptional<string>;
	declare dayId: string;
	declare bundleId: string;
	declare source: TallySource;
	declare moment: CreationOptional<TallyMoment>;
	declare takenAt: Date;
	declare principal: CreationOptional<number | null>;
	declare interneuron: CreationOptional<number | null>;
	declare unclear: CreationOptional<number | null>;
	declare multiUnit: CreationOptional<number | null>;
	declare medianAmplitudeUv: CreationOptional<number | null>;
	declare noiseUv: CreationOptional<number | null>;
	declare personId: string;
	declare enteredAt: CreationOptional<Date>;
	declare isEnteredLater: CreationOptional<boolean>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;
	declare bundle?: NonAttribute<Bundle>;
	declare person?: NonAttribute<Person>;

	static define(sequelize: Sequelize): void {
		Tally.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				dayId: { type: DataTypes.UUID, allowNull: false },
				bundleId: { type: DataTypes.UUID, allowNull: false },
				source: { type: DataTypes.TEXT, allowNull: false },
				moment: DataTypes.TEXT,
				takenAt: { type: DataTypes.DATE, allowNull: false },
				principal: DataTypes.INTEGER,
				interneuron: DataTypes.INTEGER,
				unclear: DataTypes.INTEGER,
				multiUnit: DataTypes.INTEGER,
				medianAmplitudeUv: DataTypes.DECIMAL,
				noiseUv: DataTypes.DECIMAL,
				personId: { type: DataTypes.UUID, allowNull: false },
				enteredAt: DataTypes.DATE,
				isEnteredLater: DataTypes.BOOLEAN,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'tally' }
		);
	}
}
