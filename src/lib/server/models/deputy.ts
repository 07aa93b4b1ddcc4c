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

/** Somebody who answers advice for one animal in the PI's place. */
export class Deputy extends Model<InferAttributes<Deputy>, InferCreationAttributes<Deputy>> {
	declare id: CreationOptional<string>;
	declare animalId: string;
	declare personId: string;
	declare namedBy: string;
	declare namedAt: CreationOptional<Date>;
	declare endedAt: CreationOptional<Date | null>;
	declare endedBy: CreationOptional<string | null>;

	/** Those who stand now, with their names. */
	static ofAnimal(
		animalId: string
	): Promise<{ id: string; personId: string; personName: string; namedAt: Date }[]> {
		return db().query(
			`SELECT d.id, d.person_id AS "personId", p.name AS "personName", d.named_at AS "namedAt"
			FROM deputy d JOIN person p ON p.id = d.person_id
			WHERE d.animal_id = $animalId AND d.ended_at IS NULL AND p.deactivated_at IS NULL
			ORDER BY d.named_at`,
			{ bind: { animalId }, type: QueryTypes.SELECT }
		);
	}

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
