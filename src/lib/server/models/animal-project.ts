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
import { inForceOn } from './in-force';
import type { Project } from './project';

/** Days an animal belongs to a project. */
export class AnimalProject extends Model<
	InferAttributes<AnimalProject>,
	InferCreationAttributes<AnimalProject>
> {
	declare id: CreationOptional<string>;
	declare animalId: string;
	declare projectId: string;
	declare fromDay: string;
	declare untilDay: CreationOptional<string | null>;
	declare project?: NonAttribute<Project>;

	/** Animals in each project on a day; projects without any are left out. */
	static async countOn(projectIds: string[], day: string): Promise<Map<string, number>> {
		const counts = await AnimalProject.count({
			where: { projectId: projectIds, ...inForceOn(day) },
			group: ['projectId'],
			distinct: true,
			col: 'animalId'
		});
		return new Map(counts.map((row) => [String(row.projectId), row.count]));
	}

	static define(sequelize: Sequelize): void {
		AnimalProject.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				animalId: { type: DataTypes.UUID, allowNull: false },
				projectId: { type: DataTypes.UUID, allowNull: false },
				fromDay: { type: DataTypes.DATEONLY, allowNull: false },
				untilDay: DataTypes.DATEONLY
			},
			{ sequelize, tableName: 'animal_project' }
		);
	}
}
