import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

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
