import { partCode, partNamed } from '$lib/format/part-code';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { TALLY_COUNTS, talliesSchema, type TallyEntry, type TallyInput } from '$lib/schemas/tally';
import type { TallyMoment, TallySource } from '$lib/schemas/enumerations';
import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, Invalid, NotFound } from '$lib/server/errors';
import type { Animal } from '$lib/server/models/animal';
import { Day } from '$lib/server/models/day';
import { Tally } from '$lib/server/models/tally';
import { parsed } from '$lib/server/parsed';
import { record as write, type Write } from '$lib/server/record';
import { animalOfCode } from './animal-of-code';
import { bundlesOf, type BundleFacts } from './carriage-stands';
import * as days from './days';
import { labClock } from './lab-clock';

/** A count in force. Null is "nobody counted"; 0 is "counted, none there". */
export interface TallyRow {
	id: string;
	date: string;
	bundleId: string;
	bundle: string;
	source: TallySource;
	moment: TallyMoment;
	takenAt: Date;
	principal: number | null;
	interneuron: number | null;
	unclear: number | null;
	multiUnit: number | null;
	medianAmplitudeUv: number | null;
	noiseUv: number | null;
	person: string;
	isEnteredLater: boolean;
}

const FIGURES = [...TALLY_COUNTS, 'medianAmplitudeUv', 'noiseUv'] as const;

/**
 * Enters the counts of a day, one row a bundle, all or none. A row that says what stands already
 * changes nothing; one that says otherwise needs `why` and replaces it.
 */
export async function record(
	by: Actor | null,
	animalCode: string,
	date: string,
	input: TallyInput[]
): Promise<TallyRow[]> {
	demand(by, 'days.write');
	const rows = parsed(talliesSchema, input);
	const personId = personOf(by);
	const { today, dayOf } = await labClock();
	await write(by, async (w) => {
		const animal = await animalOfCode(animalCode, w.t);
		await days.checkDate(animal.id, date);
		const bundles = await bundlesOf(animal.id, w.t);
		const day = await days.openDraft(w, animal.id, date);
		const changed: string[] = [];
		for (const [i, row] of rows.entries()) {
			const bundle = bundleNamed(animal, bundles, row.bundle, i);
			// First, so that a day's rows can be sent again as they were read.
			if (!(await clearWay(by, w, day, bundle, row))) continue;
			const takenAt = row.takenAt ?? now();
			if (dayOf(takenAt) !== date) {
				const message = row.takenAt
					? `This moment is not on the lab day ${date}.`
					: `Say when it was counted: the lab day ${date} is over.`;
				throw new Invalid([{ field: `[${i}].takenAt`, message }]);
			}
			const isEnteredLater = date < today;
			await Tally.create(
				{
					...figuresOf(row),
					dayId: day.id,
					bundleId: bundle.id,
					source: row.source,
					moment: row.moment,
					takenAt,
					personId,
					enteredAt: now(),
					isEnteredLater
				},
				{ transaction: w.t }
			);
			changed.push(partCode(animal.code, bundle));
		}
		await w.log('tally.record', { kind: 'day', id: day.id }, { date, bundles: changed });
	});
	return list(by, animalCode, date);
}

/** Counts in force on a day, in the order of the screws. */
export async function list(
	by: Actor | null,
	animalCode: string,
	date: string
): Promise<TallyRow[]> {
	demand(by, 'data.read');
	const animal = await animalOfCode(animalCode);
	const bundles = await bundlesOf(animal.id);
	const place = new Map(bundles.map(({ id }, i) => [id, i]));
	const rows = await Tally.findAll({
		where: { withdrawnAt: null },
		include: [
			{ association: 'day', where: { animalId: animal.id, date }, required: true },
			{ association: 'bundle' },
			{ association: 'person', attributes: ['name'] }
		],
		order: [['takenAt', 'ASC']]
	});
	return rows
		.map((row) => ({
			...figuresOf(row),
			id: row.id,
			date,
			bundleId: row.bundleId,
			bundle: row.bundle?.label ?? '',
			source: row.source,
			moment: row.moment,
			takenAt: row.takenAt,
			person: row.person?.name ?? '',
			isEnteredLater: row.isEnteredLater
		}))
		.sort((a, b) => (place.get(a.bundleId) ?? 0) - (place.get(b.bundleId) ?? 0));
}

/** Takes a count out of force; it stays readable with the reason. */
export async function withdraw(by: Actor | null, id: string, input: unknown): Promise<void> {
	demand(by, 'days.write');
	const { why } = parsed(withdrawalSchema, input);
	await write(by, async (w) => {
		const tally = await Tally.findByPk(id, { transaction: w.t });
		if (!tally || tally.withdrawnAt) throw new NotFound();
		const day = await Day.findByPk(tally.dayId, { transaction: w.t, rejectOnEmpty: true });
		await days.openDraft(w, day.animalId, day.date);
		await takeBack(by, w, tally, why);
		await w.log('tally.withdraw', { kind: 'tally', id }, { why });
	});
}

/** Makes room for a row; false when the same count stands already. */
async function clearWay(
	by: Actor,
	w: Write,
	day: Day,
	bundle: BundleFacts,
	row: TallyEntry
): Promise<boolean> {
	const { source, moment } = row;
	const standing = await Tally.findOne({
		where: { dayId: day.id, bundleId: bundle.id, source, moment, withdrawnAt: null },
		transaction: w.t
	});
	if (!standing) return true;
	if (FIGURES.every((name) => standing[name] === row[name])) return false;
	if (row.why === '') {
		throw new Conflict(
			'already-counted',
			`${bundle.label} has another count of this kind on ${day.date}. Nothing was changed: say why to replace it.`
		);
	}
	await takeBack(by, w, standing, row.why);
	return true;
}

async function takeBack(by: Actor, w: Write, tally: Tally, why: string): Promise<void> {
	await tally.update(
		{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: why },
		{ transaction: w.t }
	);
}

function bundleNamed(animal: Animal, bundles: BundleFacts[], named: string, row: number) {
	const bundle = partNamed(bundles, named, animal.code);
	if (bundle) return bundle;
	const message = `${animal.code} has no bundle "${named}".`;
	throw new Invalid([{ field: `[${row}].bundle`, message }]);
}

function figuresOf(row: Pick<TallyEntry, (typeof FIGURES)[number]>) {
	const { principal, interneuron, unclear, multiUnit, medianAmplitudeUv, noiseUv } = row;
	return { principal, interneuron, unclear, multiUnit, medianAmplitudeUv, noiseUv };
}
