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
import type { AnimalProject } from './animal-project';
import type { AnimalProtocol } from './animal-protocol';
import type { Implant } from './implant';
import type { Session } from './session';
import type { Weight } from './weight';
import type { AnimalStatus, Sex, Species } from '$lib/schemas/enumerations';

/** One animal under its code. */
export class Animal extends Model<InferAttributes<Animal>, InferCreationAttributes<Animal>> {
	declare id: CreationOptional<string>;
	declare code: string;
	declare species: Species;
	declare strain: CreationOptional<string>;
	declare sex: Sex;
	declare birthDate: CreationOptional<string | null>;
	declare source: CreationOptional<string>;
	declare status: CreationOptional<AnimalStatus>;
	declare baselineWeightG: CreationOptional<number | null>;
	declare note: CreationOptional<string>;
	declare isSimulated: CreationOptional<boolean>;
	declare createdAt: CreationOptional<Date>;
	declare revision: CreationOptional<number>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;
	declare protocols?: NonAttribute<AnimalProtocol[]>;
	declare projects?: NonAttribute<AnimalProject[]>;
	declare weights?: NonAttribute<Weight[]>;
	declare implants?: NonAttribute<Implant[]>;
	declare sessions?: NonAttribute<Session[]>;

	static define(sequelize: Sequelize): void {
		Animal.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				code: { type: DataTypes.TEXT, allowNull: false },
				species: { type: DataTypes.TEXT, allowNull: false },
				strain: DataTypes.TEXT,
				sex: { type: DataTypes.TEXT, allowNull: false },
				birthDate: DataTypes.DATEONLY,
				source: DataTypes.TEXT,
				status: DataTypes.TEXT,
				baselineWeightG: DataTypes.DECIMAL,
				note: DataTypes.TEXT,
				isSimulated: DataTypes.BOOLEAN,
				createdAt: DataTypes.DATE,
				revision: DataTypes.INTEGER,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'animal' }
		);
	}
}
