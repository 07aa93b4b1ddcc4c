import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import type { Protocol } from '$lib/server/models/protocol';
import { ProtocolPerson } from '$lib/server/models/protocol-person';
import { makeAnimal } from '../../factories/animal';
import { makeProtocol } from '../../factories/protocol';

/** An animal on a protocol since January that names the surgeon. */
export async function coverAnimal({
	surgeon,
	...fields
}: { surgeon: string } & Partial<Pick<Protocol, 'surgeriesAllowed' | 'expiresOn'>>) {
	const [animal, protocol] = await Promise.all([makeAnimal(), makeProtocol(fields)]);
	const fromDay = '2026-01-01';
	await AnimalProtocol.create({ animalId: animal.id, protocolId: protocol.id, fromDay });
	await ProtocolPerson.create({ protocolId: protocol.id, personId: surgeon, fromDay });
	return { code: animal.code, animal, protocol };
}
