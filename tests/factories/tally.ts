import type { CreationAttributes } from 'sequelize';
import { Day } from '$lib/server/models/day';
import { Tally } from '$lib/server/models/tally';
import { makeDay } from './day';
import { makeImplant } from './implant';
import { makePerson } from './person';

/** Five principal cells counted by eye; the day's animal gets an implant unless `bundleId` is given. */
export async function makeTally(fields: Partial<CreationAttributes<Tally>> = {}): Promise<Tally> {
	const dayId = fields.dayId ?? (await makeDay()).id;
	const day = await Day.findByPk(dayId, { rejectOnEmpty: true });
	return Tally.create({
		dayId,
		bundleId:
			fields.bundleId ?? (await makeImplant({ animalId: day.animalId, tetrodes: 1 })).bundles[0].id,
		personId: fields.personId ?? (await makePerson()).id,
		source: 'by-eye',
		takenAt: new Date('2026-03-02T09:30:00Z'),
		principal: 5,
		...fields
	});
}
