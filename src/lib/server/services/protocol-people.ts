import { Invalid } from '$lib/server/errors';
import { inForceOn } from '$lib/server/models/in-force';
import { Person } from '$lib/server/models/person';
import { ProtocolPerson } from '$lib/server/models/protocol-person';
import type { Write } from '$lib/server/record';

/** Makes `personIds` the people named on a protocol from `day` on; earlier days stay as they were. */
export async function nameOnProtocol(
	{ t: transaction }: Write,
	protocolId: string,
	personIds: string[],
	day: string
): Promise<void> {
	const known = await Person.count({ where: { id: personIds }, transaction });
	if (known < new Set(personIds).size) {
		throw new Invalid([{ field: 'people', message: 'One of these people is no member.' }]);
	}
	const named = await ProtocolPerson.findAll({
		where: { protocolId, ...inForceOn(day) },
		transaction
	});
	for (const row of named.filter((row) => !personIds.includes(row.personId))) {
		await row.update({ untilDay: day }, { transaction });
	}
	const already = new Set(named.map((row) => row.personId));
	const added = [...new Set(personIds)].filter((personId) => !already.has(personId));
	await ProtocolPerson.bulkCreate(
		added.map((personId) => ({ protocolId, personId, fromDay: day })),
		{ transaction }
	);
}
