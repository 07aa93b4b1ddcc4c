import type { ExclusionReason } from '$lib/schemas/enumerations';
import { EXCLUDABLE, exclusionSchema, type ExclusionInput } from '$lib/schemas/exclusion';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, NotFound } from '$lib/server/errors';
import { Bundle } from '$lib/server/models/bundle';
import { Day } from '$lib/server/models/day';
import { Exclusion } from '$lib/server/models/exclusion';
import { Session } from '$lib/server/models/session';
import { Unit } from '$lib/server/models/unit';
import { parsed } from '$lib/server/parsed';
import { record as write, type Write } from '$lib/server/record';

type Excludable = (typeof EXCLUDABLE)[number];

/** An exclusion in force. */
export interface ExclusionRow {
	id: string;
	/** What is left out: which kind of thing, and its id. */
	of: Excludable;
	subjectId: string;
	reason: ExclusionReason;
	note: string;
	wasResultSeen: boolean;
	person: string;
	excludedAt: Date;
}

/** Leaves a unit, bundle, session or day out of the figures. Nothing is computed again by it. */
export async function add(by: Actor | null, input: ExclusionInput): Promise<{ id: string }> {
	demand(by, 'exclusions.write');
	const exclusion = parsed(exclusionSchema, input);
	const personId = personOf(by);
	const of = EXCLUDABLE.find((name) => exclusion[name] !== undefined) ?? 'unitId';
	const subjectId = exclusion[of] ?? '';
	return write(by, async (w) => {
		await demandSubject(of, subjectId, w);
		const standing = await Exclusion.count({
			where: { [of]: subjectId, withdrawnAt: null },
			transaction: w.t
		});
		if (standing > 0) {
			throw new Conflict('excluded-already', 'This is left out already. Nothing was changed.');
		}
		const { id } = await Exclusion.create(
			{ ...exclusion, personId, excludedAt: now() },
			{ transaction: w.t }
		);
		const { reason, wasResultSeen } = exclusion;
		await w.log(
			'exclusion.add',
			{ kind: 'exclusion', id },
			{ [of]: subjectId, reason, wasResultSeen }
		);
		return { id };
	});
}

/** Takes an exclusion back; it stays readable with the reason. */
export async function withdraw(by: Actor | null, id: string, input: unknown): Promise<void> {
	demand(by, 'exclusions.write');
	const { why } = parsed(withdrawalSchema, input);
	await write(by, async (w) => {
		const exclusion = await Exclusion.findByPk(id, { transaction: w.t, lock: true });
		if (!exclusion || exclusion.withdrawnAt) throw new NotFound();
		await exclusion.update(
			{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: why },
			{ transaction: w.t }
		);
		await w.log('exclusion.withdraw', { kind: 'exclusion', id }, { why });
	});
}

/** Exclusions in force of these things, oldest first. */
export async function list(
	by: Actor | null,
	of: Excludable,
	subjectIds: string[]
): Promise<ExclusionRow[]> {
	demand(by, 'data.read');
	const rows = await Exclusion.findAll({
		where: { [of]: subjectIds, withdrawnAt: null },
		include: { association: 'person', attributes: ['name'] },
		order: [['excludedAt', 'ASC']]
	});
	return rows.map((row) => ({
		id: row.id,
		of,
		subjectId: row[of] ?? '',
		reason: row.reason,
		note: row.note,
		wasResultSeen: row.wasResultSeen,
		person: row.person?.name ?? '',
		excludedAt: row.excludedAt
	}));
}

async function demandSubject(of: Excludable, id: string, { t }: Write): Promise<void> {
	// Held, so that two people cannot leave out the same thing at once.
	const options = { transaction: t, lock: true, attributes: ['id'] };
	const found = {
		unitId: () => Unit.findByPk(id, options),
		bundleId: () => Bundle.findByPk(id, options),
		sessionId: () => Session.findByPk(id, options),
		dayId: () => Day.findByPk(id, options)
	};
	if (!(await found[of]())) throw new NotFound();
}
