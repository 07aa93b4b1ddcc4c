import type { CreationAttributes } from 'sequelize';
import { Unit } from '$lib/server/models/unit';
import { nextNumber } from './sequence';
import { makeSorting } from './sorting';

/** A unit of three spikes, little-endian float64 seconds. */
export async function makeUnit(fields: Partial<CreationAttributes<Unit>> = {}): Promise<Unit> {
	return Unit.create({
		sortingId: fields.sortingId ?? (await makeSorting()).id,
		label: String(nextNumber()),
		spikeCount: 3,
		firstSpikeS: 1,
		lastSpikeS: 3,
		spikes: Buffer.from(new Float64Array([1, 2, 3]).buffer),
		...fields
	});
}
