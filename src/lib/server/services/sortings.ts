import { Op, QueryTypes, type Transaction } from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { sortingInputSchema, type SortingDetail } from '$lib/schemas/sorting';
import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { db } from '$lib/server/db';
import { Conflict, Invalid, NotFound } from '$lib/server/errors';
import { Person } from '$lib/server/models/person';
import { Session } from '$lib/server/models/session';
import { Sorting } from '$lib/server/models/sorting';
import { SortingSession } from '$lib/server/models/sorting-session';
import { parsed } from '$lib/server/parsed';
import { record, type Write } from '$lib/server/record';
import { animalOfCode } from './animal-of-code';

export interface SortingView {
	id: string;
	person: string;
	program: string;
	programVersion: string;
	createdAt: string;
	/** Sessions covered besides the one asked for. */
	alsoCovers: number;
	supersedesId: string | null;
	dataFileId: string | null;
	units: number;
	spikes: number;
	/** The newest in force that none supersedes: what an analysis takes unless told otherwise. */
	isCurrent: boolean;
	withdrawn: { at: string; why: string } | null;
}

/** One unit as a take-in gives it: times are already a blob. */
export interface NewUnit {
	label: string;
	bundle: string | null;
	spikes: Uint8Array;
	spikeCount: number;
	firstS: number | null;
	lastS: number | null;
}

const subject = (id: string) => ({ kind: 'sorting', id });

/** Sortings that cover a session, newest first. */
export async function list(by: Actor | null, sessionId: string): Promise<SortingView[]> {
	demand(by, 'data.read');
	const rows = await db().query<
		Omit<SortingView, 'isCurrent' | 'withdrawn' | 'createdAt'> & {
			createdAt: Date;
			isSuperseded: boolean;
			withdrawnAt: Date | null;
			withdrawnWhy: string | null;
		}
	>(
		`SELECT s.id, p.name AS person, s.program, s.program_version AS "programVersion",
			s.created_at AS "createdAt", s.supersedes_id AS "supersedesId",
			s.data_file_id AS "dataFileId", s.withdrawn_at AS "withdrawnAt",
			s.withdrawn_why AS "withdrawnWhy",
			(SELECT count(*)::int - 1 FROM sorting_session o WHERE o.sorting_id = s.id) AS "alsoCovers",
			EXISTS (SELECT 1 FROM sorting n WHERE n.supersedes_id = s.id AND n.withdrawn_at IS NULL)
				AS "isSuperseded",
			count(u.id)::int AS units, coalesce(sum(u.spike_count), 0)::int AS spikes
		FROM sorting_session c
		JOIN sorting s ON s.id = c.sorting_id
		JOIN person p ON p.id = s.person_id
		LEFT JOIN unit u ON u.sorting_id = s.id
		WHERE c.session_id = $sessionId
		GROUP BY s.id, p.name
		ORDER BY s.created_at DESC, s.id DESC`,
		{ bind: { sessionId }, type: QueryTypes.SELECT }
	);
	const current = rows.find((row) => !row.withdrawnAt && !row.isSuperseded && row.units > 0);
	return rows.map(({ isSuperseded: _, withdrawnAt, withdrawnWhy, createdAt, ...row }) => ({
		...row,
		createdAt: createdAt.toISOString(),
		isCurrent: row.id === current?.id,
		withdrawn:
			withdrawnAt && withdrawnWhy ? { at: withdrawnAt.toISOString(), why: withdrawnWhy } : null
	}));
}

/** Ids of the sessions a sorting covers, in the order they were recorded. @throws NotFound */
export async function sessionsOf(by: Actor | null, id: string): Promise<string[]> {
	demand(by, 'data.read');
	const rows = await db().query<{ id: string }>(
		`SELECT s.id FROM sorting_session c JOIN session s ON s.id = c.session_id
		WHERE c.sorting_id = $id ORDER BY s.starts_at, s.id`,
		{ bind: { id }, type: QueryTypes.SELECT }
	);
	if (rows.length === 0) throw new NotFound();
	return rows.map((row) => row.id);
}

/** Announces a sorting of one or more sessions of a day; its spikes come with a file. */
export async function create(
	by: Actor | null,
	animalCode: string,
	input: unknown
): Promise<{ id: string }> {
	demand(by, 'sessions.write');
	const { sessions: ids, ...detail } = parsed(sortingInputSchema, input);
	return record(by, async (w) => {
		const animal = await animalOfCode(animalCode, w.t);
		const sessions = await Session.findAll({
			where: { id: ids, animalId: animal.id, withdrawnAt: null },
			transaction: w.t
		});
		if (sessions.length < new Set(ids).size) {
			const message = `Not all of these are sessions of ${animal.code}.`;
			throw new Invalid([{ field: 'sessions', message }]);
		}
		if (new Set(sessions.map(({ dayId }) => dayId)).size > 1) {
			const message = 'A sorting covers sessions of one day.';
			throw new Invalid([{ field: 'sessions', message }]);
		}
		return { id: await add(w, by, sessions, detail, null) };
	});
}

/** Adds a sorting as part of a write. */
export async function add(
	w: Write,
	by: Actor,
	sessions: Session[],
	detail: SortingDetail,
	dataFileId: string | null
): Promise<string> {
	if (detail.supersedes) {
		const covered = await SortingSession.count({
			where: { sortingId: detail.supersedes, sessionId: sessions.map(({ id }) => id) },
			transaction: w.t
		});
		if (covered === 0) {
			const message = 'The sorting to supersede covers none of these sessions.';
			throw new Invalid([{ field: 'supersedes', message }]);
		}
	}
	const { personId = null } = detail;
	if (personId && !(await Person.findByPk(personId, { transaction: w.t }))) {
		throw new Invalid([{ field: 'personId', message: 'There is no such person.' }]);
	}
	const [{ animalId, dayId }] = sessions;
	const sorting = await Sorting.create(
		{
			animalId,
			dayId,
			personId: personId ?? personOf(by),
			program: detail.program,
			programVersion: detail.programVersion,
			supersedesId: detail.supersedes,
			dataFileId
		},
		{ transaction: w.t }
	);
	await SortingSession.bulkCreate(
		sessions.map(({ id }) => ({ sortingId: sorting.id, sessionId: id })),
		{ transaction: w.t }
	);
	const detailToLog = { sessions: sessions.map(({ id }) => id), program: detail.program };
	await w.log('sorting.create', subject(sorting.id), detailToLog);
	return sorting.id;
}

/** Fills a sorting with the units of a file. Blobs go as parameters: as SQL text they would double. */
export async function putUnits(
	w: Write,
	sortingId: string,
	units: readonly NewUnit[]
): Promise<void> {
	const bundles = await bundleIds(sortingId, w.t);
	for (const unit of units) {
		await db().query(
			`INSERT INTO unit (id, sorting_id, label, bundle_label, bundle_id, spike_count,
				first_spike_s, last_spike_s, spikes)
			VALUES ($id, $sortingId, $label, $bundle, $bundleId, $spikeCount, $firstS, $lastS, $spikes)`,
			{
				bind: {
					...unit,
					id: uuidv7(),
					sortingId,
					bundleId: (unit.bundle && bundles.get(unit.bundle.toLowerCase())) ?? null,
					spikes: Buffer.from(unit.spikes.buffer, unit.spikes.byteOffset, unit.spikes.byteLength)
				},
				transaction: w.t
			}
		);
	}
}

/** Bundles of the animal's implants on the sorting's day, by label; a newer implant's come first. */
export async function bundleIds(
	sortingId: string,
	transaction: Transaction
): Promise<Map<string, string>> {
	const rows = await db().query<{ label: string; id: string }>(
		`SELECT lower(b.label) AS label, b.id
		FROM sorting s
		JOIN day d ON d.id = s.day_id
		JOIN implant i ON i.animal_id = s.animal_id AND i.withdrawn_at IS NULL
			AND i.surgery_day <= d.date
		JOIN bundle b ON b.implant_id = i.id
		WHERE s.id = $sortingId
		ORDER BY i.surgery_day, i.letter`,
		{ bind: { sortingId }, type: QueryTypes.SELECT, transaction }
	);
	return new Map(rows.map(({ label, id }) => [label, id]));
}

/** The sorting an analysis of the session takes, or null while there is none with units. */
export async function currentOf(
	sessionId: string,
	transaction: Transaction
): Promise<string | null> {
	const [row] = await db().query<{ id: string }>(
		`SELECT s.id FROM sorting_session c JOIN sorting s ON s.id = c.sorting_id
		WHERE c.session_id = $sessionId AND s.withdrawn_at IS NULL
			AND NOT EXISTS (
				SELECT 1 FROM sorting n WHERE n.supersedes_id = s.id AND n.withdrawn_at IS NULL
			)
			AND EXISTS (SELECT 1 FROM unit u WHERE u.sorting_id = s.id)
		ORDER BY s.created_at DESC, s.id DESC LIMIT 1`,
		{ bind: { sessionId }, type: QueryTypes.SELECT, transaction }
	);
	return row?.id ?? null;
}

/**
 * Takes the sortings of a session along when it moves, and ties their units to the bundles there.
 * @throws Conflict when one covers other sessions too, which would stay behind
 */
export async function moveSortings(
	sessionId: string,
	place: { animalId: string; dayId: string },
	w: Write
): Promise<void> {
	const covers = await SortingSession.findAll({ where: { sessionId }, transaction: w.t });
	for (const { sortingId } of covers) {
		const others = await SortingSession.count({
			where: { sortingId, sessionId: { [Op.ne]: sessionId } },
			transaction: w.t
		});
		if (others > 0) {
			throw new Conflict(
				'shared-sorting',
				'A sorting of this session covers other sessions too. Withdraw that sorting first, then move the session. Nothing was changed.'
			);
		}
		await Sorting.update(place, { where: { id: sortingId }, transaction: w.t });
		const bundles = await bundleIds(sortingId, w.t);
		await db().query(
			`UPDATE unit SET bundle_id = ($bundles::jsonb ->> lower(bundle_label))::uuid
			WHERE sorting_id = $sortingId`,
			{
				bind: { sortingId, bundles: JSON.stringify(Object.fromEntries(bundles)) },
				transaction: w.t
			}
		);
	}
}

export async function withdraw(by: Actor | null, id: string, input: unknown): Promise<void> {
	demand(by, 'sessions.write');
	const { why } = parsed(withdrawalSchema, input);
	await record(by, async (w) => {
		const sorting = await Sorting.findByPk(id, { transaction: w.t, lock: true });
		if (!sorting) throw new NotFound();
		if (sorting.withdrawnAt) throw new Conflict('withdrawn', 'This sorting is withdrawn already.');
		await sorting.update(
			{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: why },
			{ transaction: w.t }
		);
		await w.log('sorting.withdraw', subject(id), { why });
	});
}
