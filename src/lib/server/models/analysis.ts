import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { AnalysisState } from '$lib/schemas/enumerations';
import type { AnalysisFailure, AnalysisSetup } from '$lib/schemas/data-state';
import type { AnalysisResult } from '$lib/analysis/session/analysis-result';
import type { SessionParameters } from '$lib/analysis/session/parameters';

/** One computation on named inputs; final once done. */
export class Analysis extends Model<InferAttributes<Analysis>, InferCreationAttributes<Analysis>> {
	declare id: CreationOptional<string>;
	declare sessionId: string;
	declare sortingId: string;
	declare positionFileId: string;
	declare parameters: SessionParameters;
	declare setup: CreationOptional<AnalysisSetup>;
	declare positionSha256: string;
	declare spikesSha256: string;
	declare analysisVersion: string;
	declare codeVersion: string;
	declare state: CreationOptional<AnalysisState>;
	declare progress: CreationOptional<number>;
	declare attempts: CreationOptional<number>;
	declare workerLock: CreationOptional<number | null>;
	declare jobId: CreationOptional<string | null>;
	declare askedBy: CreationOptional<string | null>;
	declare askedAt: CreationOptional<Date>;
	declare startedAt: CreationOptional<Date | null>;
	declare finishedAt: CreationOptional<Date | null>;
	declare failure: CreationOptional<AnalysisFailure | null>;
	declare warnings: CreationOptional<string[] | null>;
	declare unitsUsed: CreationOptional<number | null>;
	declare windows: CreationOptional<number | null>;
	declare medianErrorCm: CreationOptional<number | null>;
	declare medianErrorLowCm: CreationOptional<number | null>;
	declare medianErrorHighCm: CreationOptional<number | null>;
	declare chanceMedianErrorCm: CreationOptional<number | null>;
	declare result: CreationOptional<AnalysisResult | null>;
	declare arraysSha256: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		Analysis.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				sessionId: { type: DataTypes.UUID, allowNull: false },
				sortingId: { type: DataTypes.UUID, allowNull: false },
				positionFileId: { type: DataTypes.UUID, allowNull: false },
				parameters: { type: DataTypes.JSONB, allowNull: false },
				setup: DataTypes.JSONB,
				positionSha256: { type: DataTypes.TEXT, allowNull: false },
				spikesSha256: { type: DataTypes.TEXT, allowNull: false },
				analysisVersion: { type: DataTypes.TEXT, allowNull: false },
				codeVersion: { type: DataTypes.TEXT, allowNull: false },
				state: DataTypes.TEXT,
				progress: DataTypes.DOUBLE,
				attempts: DataTypes.INTEGER,
				workerLock: DataTypes.BIGINT,
				jobId: DataTypes.UUID,
				askedBy: DataTypes.UUID,
				askedAt: DataTypes.DATE,
				startedAt: DataTypes.DATE,
				finishedAt: DataTypes.DATE,
				failure: DataTypes.JSONB,
				warnings: DataTypes.JSONB,
				unitsUsed: DataTypes.INTEGER,
				windows: DataTypes.INTEGER,
				medianErrorCm: DataTypes.DOUBLE,
				medianErrorLowCm: DataTypes.DOUBLE,
				medianErrorHighCm: DataTypes.DOUBLE,
				chanceMedianErrorCm: DataTypes.DOUBLE,
				result: DataTypes.JSON,
				arraysSha256: DataTypes.TEXT
			},
			{ sequelize, tableName: 'analysis' }
		);
	}
}
