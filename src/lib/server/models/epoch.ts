import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { EpochKind } from '$lib/schemas/enumerations';

/** A stretch of a session on the recorder's clock. */
export class Epoch extends Model<InferAttributes<Epoch>, InferCreationAttributes<Epoch>> {
	declare id: CreationOptional<string>;
	declare sessionId: string;
	declare name: string;
	declare kind: EpochKind;
	declare startS: number;
	declare stopS: number;
	declare arenaId: CreationOptional<string | null>;
	declare configuration: CreationOptional<string>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		Epoch.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				sessionId: { type: DataTypes.UUID, allowNull: false },
				name: { type: DataTypes.TEXT, allowNull: false },
				kind: { type: DataTypes.TEXT, allowNull: false },
				startS: { type: DataTypes.DECIMAL, allowNull: false },
				stopS: { type: DataTypes.DECIMAL, allowNull: false },
				arenaId: DataTypes.UUID,
				configuration: DataTypes.TEXT,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'epoch' }
		);
	}
}
