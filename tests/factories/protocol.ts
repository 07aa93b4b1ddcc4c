import type { CreationAttributes } from 'sequelize';
import { db } from '$lib/server/db';
import { Protocol } from '$lib/server/models/protocol';
import { nextNumber } from './sequence';

/** A protocol that expires far in the future. */
export async function makeProtocol(
	fields: Partial<CreationAttributes<Protocol>> = {}
): Promise<Protocol> {
	db();
	return Protocol.create({
		number: `SIM-${nextNumber()}`,
		title: 'Simulated recordings',
		animalsAllowed: 20,
		surgeriesAllowed: 2,
		restriction: 'food',
		weightFloorPercent: 85,
		longestImplantDays: 180,
		expiresOn: '2099-12-31',
		...fields
	});
}
