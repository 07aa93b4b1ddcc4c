import {
	DataTypes,
	Model,
	QueryTypes,
	type CreationAttributes,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize,
	type Transaction
} from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import { db } from '$lib/server/db';

/** A mail to send, sent, or given up. */
export class Outbox extends Model<InferAttributes<Outbox>, InferCreationAttributes<Outbox>> {
	declare id: CreationOptional<string>;
	declare dedupeKey: string;
	declare kind: string;
	declare toEmail: string;
	declare toPersonId: CreationOptional<string | null>;
	declare subject: string;
	declare bodyText: string;
	declare createdAt: CreationOptional<Date>;
	declare attempts: CreationOptional<number>;
	declare lastAttemptAt: CreationOptional<Date | null>;
	declare lastError: CreationOptional<string | null>;
	declare sentAt: CreationOptional<Date | null>;
	declare deadAt: CreationOptional<Date | null>;

	/** @returns the new row's id, or null when a mail of this key exists */
	static async putOnce(
		mail: CreationAttributes<Outbox>,
		transaction: Transaction
	): Promise<string | null> {
		const [row] = await db().query<{ id: string }>(
			`INSERT INTO outbox (id, dedupe_key, kind, to_email, to_person_id, subject, body_text)
			VALUES ($id, $dedupeKey, $kind, $toEmail, $toPersonId, $subject, $bodyText)
			ON CONFLICT (dedupe_key) DO NOTHING RETURNING id`,
			{
				bind: { id: uuidv7(), toPersonId: null, ...mail },
				type: QueryTypes.SELECT,
				transaction
			}
		);
		return row?.id ?? null;
	}

	static define(sequelize: Sequelize): void {
		Outbox.init(
			{
				id: { type: DataTypes.UUID, primaryKey: true, defaultValue: () => uuidv7() },
				dedupeKey: { type: DataTypes.TEXT, allowNull: false },
				kind: { type: DataTypes.TEXT, allowNull: false },
				toEmail: { type: DataTypes.TEXT, allowNull: false },
				toPersonId: DataTypes.UUID,
				subject: { type: DataTypes.TEXT, allowNull: false },
				bodyText: { type: DataTypes.TEXT, allowNull: false },
				createdAt: DataTypes.DATE,
				attempts: DataTypes.INTEGER,
				lastAttemptAt: DataTypes.DATE,
				lastError: DataTypes.TEXT,
				sentAt: DataTypes.DATE,
				deadAt: DataTypes.DATE
			},
			{ sequelize, tableName: 'outbox' }
		);
	}
}
