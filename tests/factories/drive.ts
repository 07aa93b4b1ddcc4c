import type { CreationAttributes } from 'sequelize';
import { Drive } from '$lib/server/models/drive';
import { makeDriveDesign } from './drive-design';
import { nextNumber } from './sequence';

/** A drive of its own design unless `designId` is given. */
export async function makeDrive(fields: Partial<CreationAttributes<Drive>> = {}): Promise<Drive> {
	return Drive.create({
		designId: fields.designId ?? (await makeDriveDesign()).id,
		serial: `S${nextNumber()}`,
		...fields
	});
}
