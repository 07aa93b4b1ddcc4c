import { createHash } from 'node:crypto';
import type { CreationAttributes } from 'sequelize';
import { DataFile } from '$lib/server/models/data-file';
import { makePerson } from './person';
import { nextNumber } from './sequence';
import { makeSession } from './session';

/** A file received and not yet read; its bytes are not in storage. */
export async function makeDataFile(
	fields: Partial<CreationAttributes<DataFile>> = {}
): Promise<DataFile> {
	const digest = createHash('sha256').update(`file ${nextNumber()}`).digest('hex');
	return DataFile.create({
		sessionId: fields.sessionId ?? (await makeSession()).id,
		uploadedBy: fields.uploadedBy ?? (await makePerson()).id,
		kind: 'position',
		sha256: digest,
		parsedSha256: fields.state === 'taken-in' ? digest : null,
		bytes: 100,
		originalName: 'position.csv',
		format: 'csv',
		state: 'received',
		...fields
	});
}
