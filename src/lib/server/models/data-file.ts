import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { DataFormat, DataKind, DataState } from '$lib/schemas/enumerations';
import type { DataReading, DataRefusal } from '$lib/schemas/data-state';

/** An uploaded original, kept by its digest, and what was read from it. */
export class DataFile extends Model<InferAttributes<DataFile>, InferCreationAttributes<DataFile>> {
	declare id: CreationOptional<string>;
	declare sessionId: string;
	declare kind: DataKind;
	declare sha256: string;
	declare bytes: number;
	declare originalName: string;
	declare format: DataFormat;
	declare state: DataState;
	declare reading: CreationOptional<DataReading>;
	declare rowCount: CreationOptional<number | null>;
	declare columns: CreationOptional<string[] | null>;
	declare warnings: CreationOptional<string[]>;
	declare refusal: CreationOptional<DataRefusal | null>;
	declare parsedSha256: CreationOptional<string | null>;
	declare uploadedBy: string;
	declare uploadedAt: CreationOptional<Date>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare withdrawnBy: CreationOptional<string | null>;
	declare withdrawnWhy: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		DataFile.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				sessionId: { type: DataTypes.UUID, allowNull: false },
				kind: { type: DataTypes.TEXT, allowNull: false },
				sha256: { type: DataTypes.TEXT, allowNull: false },
				bytes: { type: DataTypes.BIGINT, allowNull: false },
				originalName: { type: DataTypes.TEXT, allowNull: false },
				format: { type: DataTypes.TEXT, allowNull: false },
				state: { type: DataTypes.TEXT, allowNull: false },
				reading: DataTypes.JSONB,
				rowCount: DataTypes.BIGINT,
				columns: DataTypes.ARRAY(DataTypes.TEXT),
				warnings: DataTypes.JSONB,
				refusal: DataTypes.JSONB,
				parsedSha256: DataTypes.TEXT,
				uploadedBy: { type: DataTypes.UUID, allowNull: false },
				uploadedAt: DataTypes.DATE,
				withdrawnAt: DataTypes.DATE,
				withdrawnBy: DataTypes.UUID,
				withdrawnWhy: DataTypes.TEXT
			},
			{ sequelize, tableName: 'data_file' }
		);
	}
}
