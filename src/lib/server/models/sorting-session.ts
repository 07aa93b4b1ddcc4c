import {
	DataTypes,
	Model,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';

/** A session that a sorting covers. */
export class SortingSession extends Model<
	InferAttributes<SortingSession>,
	InferCreationAttributes<SortingSession>
> {
	declare sortingId: string;
	declare sessionId: string;

	static define(sequelize: Sequelize): void {
		SortingSession.init(
			{
				sortingId: { type: DataTypes.UUID, primaryKey: true },
				sessionId: { type: DataTypes.UUID, primaryKey: true }
			},
			{ sequelize, tableName: 'sorting_session' }
		);
	}
}
