import type { Transaction } from 'sequelize';
import { formatDay } from '$lib/format/date';
import { formatQuantity } from '$lib/format/number';
import { Conflict, Invalid } from '$lib/server/errors';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import { Implant } from '$lib/server/models/implant';
import { inForceOn } from '$lib/server/models/in-force';
import { Person } from '$lib/server/models/person';
import { ProtocolPerson } from '$lib/server/models/protocol-person';
import { holdProtocol } from './protocol-places';

interface Planned {
	animalId: string;
	surgeryDay: string;
	surgeonId: string;
	/** The implant that is being corrected, which does not count against itself. */
	implantId?: string;
}

/**
 * Refuses a surgery the protocol does not cover, so that a slip shows before it is on record. What
 * is approved is decided by the approval itself, the veterinarian and local rules.
 * @throws Conflict `no-protocol`, `protocol-expired`, `surgeries-used`, `not-named`; Invalid `surgeon`
 */
export async function checkLimits(planned: Planned, today: string, t: Transaction): Promise<void> {
	const { animalId, surgeryDay, surgeonId } = planned;
	const on = formatDay(surgeryDay);
	const stay = await AnimalProtocol.findOne({
		where: { animalId, ...inForceOn(surgeryDay) },
		transaction: t
	});
	if (!stay) {
		throw new Conflict(
			'no-protocol',
			`The animal was on no protocol on ${on}. Put it on one that covers that day first, on its page.`
		);
	}
	const protocol = await holdProtocol({ id: stay.protocolId }, t);
	if (protocol.expiresOn < surgeryDay) {
		throw new Conflict(
			'protocol-expired',
			`Protocol ${protocol.number} was valid until ${formatDay(protocol.expiresOn)}, before the surgery on ${on}.`
		);
	}
	const surgeries = await Implant.findAll({
		where: { animalId, withdrawnAt: null },
		attributes: ['id'],
		transaction: t
	});
	const others = surgeries.filter(({ id }) => id !== planned.implantId).length;
	if (others >= protocol.surgeriesAllowed) {
		throw new Conflict(
			'surgeries-used',
			`Protocol ${protocol.number} allows ${formatQuantity(protocol.surgeriesAllowed, 'surgery', 'surgeries')} per animal, and this animal has had ${others}.`
		);
	}
	await checkSurgeon(surgeonId, protocol.id, protocol.number, surgeryDay, today, t);
}

async function checkSurgeon(
	surgeonId: string,
	protocolId: string,
	number: string,
	surgeryDay: string,
	today: string,
	transaction: Transaction
): Promise<void> {
	const surgeon = await Person.findByPk(surgeonId, {
		include: [{ association: 'roleGrants', where: { role: ['surgeon', 'pi'], revokedAt: null } }],
		transaction
	});
	if (!surgeon) {
		const message =
			'Choose a member who is surgeon or PI. A PI or admin gives roles on the Lab page.';
		throw new Invalid([{ field: 'surgeon', message }]);
	}
	// A lab that takes in a running animal names its people on the day it writes the protocol down.
	const named = await ProtocolPerson.findAll({
		where: { protocolId, personId: surgeonId },
		transaction
	});
	const isNamed = named.some(
		({ fromDay, untilDay }) => fromDay <= today && (!untilDay || untilDay > surgeryDay)
	);
	if (isNamed) return;
	throw new Conflict(
		'not-named',
		`${surgeon.name} is not named on protocol ${number}. A PI names people on the protocol's page.`
	);
}
