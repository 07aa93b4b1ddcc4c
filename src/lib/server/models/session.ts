import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** One run of the recorder. */
export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
	declare id: CreationOptional<string>;
	declare animalId: string;
	declare dayId: string;
	declare startsAt: Date;
	declare clockZeroAt: Date;
	declare arenaId: CreationOptional<string | null>;
	declare rigId: CreationOptional<string | null>;
	declare reference: CreationOptional<string>;
	declare ground: CreationOptional<string>;
	declare filters: CreationOptional<string>;
	declare gain: CreationOptional<string>;
	declare headstageSerial: CreationOptional<string>;
	declare note: CreationOptional<string>;
	declare createdBy: string;
	declare createdAt: CreationOptional<Date>;
	declare revision: CreationOptional<number>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;
	declare currentAnalysisId: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		Session.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				animalId: { type: DataTypes.UUID, allowNull: false },
				dayId: { type: DataTypes.UUID, allowNull: false },
				startsAt: { type: DataTypes.DATE, allowNull: false },
				clockZeroAt: { type: DataTypes.DATE, allowNull: false },
				arenaId: DataTypes.UUID,
				rigId: DataTypes.UUID,
				reference: DataTypes.TEXT,
				ground: DataTypes.TEXT,
				filters: DataTypes.TEXT,
				gain: DataTypes.TEXT,
				headstageSerial: DataTypes.TEXT,
				note: DataTypes.TEXT,
				createdBy: { type: DataTypes.UUID, allowNull: false },
				createdAt: DataTypes.DATE,
				revision: DataTypes.INTEGER,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT,
				currentAnalysisId: DataTypes.UUID
			},
			{ sequelize, tableName: 'session' }
		);
	}
}
