import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { Theme } from '$lib/schemas/enumerations';

/** Somebody who signs in. Never removed: a deactivated person stays as author and signer. */
export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
	declare id: CreationOptional<string>;
	declare email: string;
	declare name: string;
	declare passwordHash: CreationOptional<string | null>;
	declare isBlinded: CreationOptional<boolean>;
	declare timeZone: CreationOptional<string | null>;
	declare theme: CreationOptional<Theme | null>;
	declare createdAt: CreationOptional<Date>;
	declare deactivatedAt: CreationOptional<Date | null>;
	declare revision: CreationOptional<number>;

	static define(sequelize: Sequelize): void {
		Person.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				email: { type: DataTypes.TEXT, allowNull: false },
				name: { type: DataTypes.TEXT, allowNull: false },
				passwordHash: DataTypes.TEXT,
				isBlinded: DataTypes.BOOLEAN,
				timeZone: DataTypes.TEXT,
				theme: DataTypes.TEXT,
				createdAt: DataTypes.DATE,
				deactivatedAt: DataTypes.DATE,
				revision: DataTypes.INTEGER
			},
			{ sequelize, tableName: 'person' }
		);
	}
}
