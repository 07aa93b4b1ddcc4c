import type { CreationAttributes } from 'sequelize';
import { db } from '$lib/server/db';
import { DriveDesign } from '$lib/server/models/drive-design';
import { nextNumber } from './sequence';

/** A design of 0-80 screws (317.5 µm a turn), 5 mm of travel, 40 µm of slack. */
export async function makeDriveDesign(
	fields: Partial<CreationAttributes<DriveDesign>> = {}
): Promise<DriveDesign> {
	db();
	return DriveDesign.create({
		name: `Design ${nextNumber()}`,
		thread: '0-80 UNF',
		pitchUm: 317.5,
		travelMm: 5,
		smallestStepTurns: 0.0625,
		backlashUm: 40,
		...fields
	});
}
