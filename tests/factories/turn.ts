import type { CreationAttributes } from 'sequelize';
import { Turn } from '$lib/server/models/turn';
import { makeImplant } from './implant';
import { makePerson } from './person';

/** A quarter turn down, on a new implant's first carriage unless `carriageId` is given. */
export async function makeTurn(fields: Partial<CreationAttributes<Turn>> = {}): Promise<Turn> {
	return Turn.create({
		carriageId: fields.carriageId ?? (await makeImplant({ tetrodes: 1 })).carriages[0].id,
		personId: fields.personId ?? (await makePerson()).id,
		doneAt: new Date('2026-03-02T09:00:00Z'),
		turns: 0.25,
		...fields
	});
}
