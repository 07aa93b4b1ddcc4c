import type { CreationAttributes } from 'sequelize';
import { Session } from '$lib/server/models/session';
import { Sorting } from '$lib/server/models/sorting';
import { SortingSession } from '$lib/server/models/sorting-session';
import { makePerson } from './person';
import { makeSession } from './session';

/** A sorting of one session, a new one unless `sessionId` is given. */
export async function makeSorting({
	sessionId,
	...fields
}: Partial<CreationAttributes<Sorting>> & { sessionId?: string } = {}): Promise<Sorting> {
	const session = sessionId
		? await Session.findByPk(sessionId, { rejectOnEmpty: true })
		: await makeSession();
	const sorting = await Sorting.create({
		animalId: session.animalId,
		dayId: session.dayId,
		personId: fields.personId ?? (await makePerson()).id,
		...fields
	});
	await SortingSession.create({ sortingId: sorting.id, sessionId: session.id });
	return sorting;
}
