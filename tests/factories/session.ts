import type { CreationAttributes } from 'sequelize';
import { Day } from '$lib/server/models/day';
import { Epoch } from '$lib/server/models/epoch';
import { Session } from '$lib/server/models/session';
import { makeArena } from './arena';
import { makeDay } from './day';
import { makePerson } from './person';

/** A session of one run epoch of ten minutes, in a new arena unless `arenaId` is given. */
export async function makeSession({
	arenaId,
	...fields
}: Partial<CreationAttributes<Session>> & { arenaId?: string } = {}): Promise<Session> {
	const day = fields.dayId
		? await Day.findByPk(fields.dayId, { rejectOnEmpty: true })
		: await makeDay(fields.animalId ? { animalId: fields.animalId } : {});
	const session = await Session.create({
		animalId: day.animalId,
		dayId: day.id,
		startsAt: new Date('2026-03-02T10:00:00Z'),
		clockZeroAt: new Date('2026-03-02T10:00:00Z'),
		createdBy: fields.createdBy ?? (await makePerson()).id,
		...fields
	});
	await Epoch.create({
		sessionId: session.id,
		name: 'run',
		kind: 'run',
		startS: 0,
		stopS: 600,
		arenaId: arenaId ?? (await makeArena()).id
	});
	return session;
}
