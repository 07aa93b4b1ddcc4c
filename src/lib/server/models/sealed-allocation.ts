import {
	DataTypes,
	Model,
	QueryTypes,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import { db } from '$lib/server/db';

/** Without the group: that column leaves the table through a logged opening only. */
export interface AllocationRow {
	id: string;
	animalId: string;
	animalCode: string;
	projectId: string;
	projectName: string;
	sealedAt: Date;
}

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

	static standing(projectId: string | null = null): Promise<AllocationRow[]> {
		return db().query<AllocationRow>(
			`SELECT s.id, s.animal_id AS "animalId", a.code AS "animalCode",
				s.project_id AS "projectId", p.name AS "projectName", s.sealed_at AS "sealedAt"
			FROM sealed_allocation s JOIN animal a ON a.id = s.animal_id
				JOIN project p ON p.id = s.project_id
			WHERE s.withdrawn_at IS NULL AND ($projectId::uuid IS NULL OR s.project_id = $projectId)
			ORDER BY p.name, a.code`,
			{ bind: { projectId }, type: QueryTypes.SELECT }
		);
	}

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
