import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type NonAttribute,
	type Sequelize,
	type Transaction
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { Person } from './person';

/** One entry of the ledger; corrections are later rows that replace it. */
export class Turn extends Model<InferAttributes<Turn>, InferCreationAttributes<Turn>> {
	declare id: CreationOptional<string>;
	declare carriageId: string;
	declare doneAt: Date;
	declare enteredAt: CreationOptional<Date>;
	declare turns: number;
	declare personId: string;
	declare reason: CreationOptional<string>;
	declare replacesId: CreationOptional<string | null>;
	declare isEnteredLater: CreationOptional<boolean>;
	declare person?: NonAttribute<Person>;

	/** Every row of these carriages, replaced ones too, by the time they were done. */
	static ofCarriages(carriageIds: string[], transaction?: Transaction): Promise<Turn[]> {
		return Turn.findAll({
			where: { carriageId: carriageIds },
			include: { association: 'person', attributes: ['name'] },
			order: [
				['doneAt', 'ASC'],
				['id', 'ASC']
			],
			transaction
		});
	}

	static define(sequelize: Sequelize): void {
		Turn.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				carriageId: { type: DataTypes.UUID, allowNull: false },
				doneAt: { type: DataTypes.DATE, allowNull: false },
				enteredAt: DataTypes.DATE,
				turns: { type: DataTypes.DECIMAL, allowNull: false },
				personId: { type: DataTypes.UUID, allowNull: false },
				reason: DataTypes.TEXT,
				replacesId: DataTypes.UUID,
				isEnteredLater: DataTypes.BOOLEAN
			},
			{ sequelize, tableName: 'turn' }
		);
	}
}
