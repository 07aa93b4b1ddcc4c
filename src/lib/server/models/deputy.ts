import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';

/** Somebody who answers advice for one animal in the PI's place. */
export class Deputy extends Model<InferAttributes<Deputy>, InferCreationAttributes<Deputy>> {
	declare id: CreationOptional<string>;
	declare animalId: string;
	declare personId: string;
	declare namedBy: string;
	declare namedAt: CreationOptional<Date>;
	declare endedAt: CreationOptional<Date | null>;
	declare endedBy: CreationOptional<string | null>;

	static define(sequelize: Sequelize): void {
		Deputy.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				animalId: { type: DataTypes.UUID, allowNull: false },
				personId: { type: DataTypes.UUID, allowNull: false },
				namedBy: { type: DataTypes.UUID, allowNull: false },
				namedAt: DataTypes.DATE,
				endedAt: DataTypes.DATE,
				endedBy: DataTypes.UUID
			},
			{ sequelize, tableName: 'deputy' }
		);
	}
}
