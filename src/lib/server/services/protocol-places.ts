import type { Transaction } from 'sequelize';
import { formatDay } from '$lib/format/date';
import { dayAfter } from '$lib/format/day-count';
import { Conflict, Invalid } from '$lib/server/errors';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import { Protocol } from '$lib/server/models/protocol';

/** Days an animal is to spend on a protocol; `until` is the first day off it. */
export interface Stay {
	from: string;
	until: string | null;
}

/** What keeps an animal off a protocol, or null. `used` counts the animals that were ever on it. */
export function placeRefusal(
	protocol: Pick<Protocol, 'number' | 'animalsAllowed' | 'expiresOn'>,
	used: number,
	{ from, until }: Stay,
	today: string
): Conflict | null {
	const lastDay = until ? dayAfter(until, -1) : from > today ? from : today;
	if (protocol.expiresOn < lastDay) {
		return new Conflict(
			'protocol-expired',
			`Protocol ${protocol.number} is valid until ${formatDay(protocol.expiresOn)}. Choose one in force, or enter its renewal on the Lab page first.`
		);
	}
	if (used >= protocol.animalsAllowed) {
		return new Conflict(
			'protocol-full',
			`Protocol ${protocol.number} allows ${protocol.animalsAllowed} animals and has had ${used}. An animal counts also after its end.`
		);
	}
	return null;
}

/** A protocol in use, held until the transaction ends, so that two writers cannot take one place. */
export async function holdProtocol(
	where: { id: string } | { number: string },
	transaction: Transaction
): Promise<Protocol> {
	const protocol = await Protocol.findOne({
		where: { ...where, withdrawnAt: null },
		lock: transaction.LOCK.UPDATE,
		transaction
	});
	if (protocol) return protocol;
	const message = 'There is no such protocol in use. Choose one from the Lab page.';
	throw new Invalid([{ field: 'id' in where ? 'id' : 'protocol', message }]);
}

/** Puts an animal on a protocol. @throws Conflict `protocol-expired`, `protocol-full` */
export async function takePlace(
	protocol: Protocol,
	animalId: string,
	stay: Stay,
	today: string,
	transaction: Transaction
): Promise<AnimalProtocol> {
	const wasOnIt = await AnimalProtocol.count({
		where: { animalId, protocolId: protocol.id },
		transaction
	});
	const used = await AnimalProtocol.countEver([protocol.id], transaction);
	const others = (used.get(protocol.id) ?? 0) - (wasOnIt > 0 ? 1 : 0);
	const refusal = placeRefusal(protocol, others, stay, today);
	if (refusal) throw refusal;
	return AnimalProtocol.create(
		{ animalId, protocolId: protocol.id, fromDay: stay.from, untilDay: stay.until },
		{ transaction }
	);
}
