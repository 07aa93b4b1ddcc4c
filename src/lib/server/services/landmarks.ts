import { partCode, partNamed } from '$lib/format/part-code';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { landmarksSchema, type LandmarkInput } from '$lib/schemas/landmark';
import type { SharpWave } from '$lib/schemas/enumerations';
import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Invalid, NotFound } from '$lib/server/errors';
import { Landmark } from '$lib/server/models/landmark';
import { Turn } from '$lib/server/models/turn';
import { parsed } from '$lib/server/parsed';
import { record as write } from '$lib/server/record';
import { animalOfCode } from './animal-of-code';
import { bundlesOf, carriagesOf, standsOf } from './carriage-stands';
import { labClock } from './lab-clock';

/** What was heard or seen, with the depth the bundle then stood at. Null is "not looked for". */
export interface LandmarkRow {
	id: string;
	bundleId: string;
	bundle: string;
	seenAt: Date;
	depthUm: number;
	sharpWave: SharpWave | null;
	ripples: number | null;
	rippleUv: number | null;
	hasTheta: boolean | null;
	hasHash: boolean | null;
	hasCells: boolean | null;
	largestUv: number | null;
	signConvention: string;
	reference: string;
	note: string;
	person: string;
	isEnteredLater: boolean;
}

/** Enters what was heard or seen, one row a bundle, all or none. */
export async function record(
	by: Actor | null,
	animalCode: string,
	input: LandmarkInput[]
): Promise<{ ids: string[] }> {
	demand(by, 'days.write');
	const rows = parsed(landmarksSchema, input);
	const personId = personOf(by);
	const { today, dayOf } = await labClock();
	return write(by, async (w) => {
		const animal = await animalOfCode(animalCode, w.t);
		const bundles = await bundlesOf(animal.id, w.t);
		const entered = rows.map(({ bundle: named, seenAt = now(), ...signs }, i) => {
			const bundle = partNamed(bundles, named, animal.code);
			if (!bundle) {
				const message = `${animal.code} has no bundle "${named}".`;
				throw new Invalid([{ field: `[${i}].bundle`, message }]);
			}
			if (seenAt.getTime() > now().getTime() + 60_000) {
				const message = 'This moment has not come yet.';
				throw new Invalid([{ field: `[${i}].seenAt`, message }]);
			}
			return { bundle, row: { ...signs, bundleId: bundle.id, seenAt } };
		});
		const made = await Landmark.bulkCreate(
			entered.map(({ row }) => ({
				...row,
				personId,
				enteredAt: now(),
				isEnteredLater: dayOf(row.seenAt) < today
			})),
			{ transaction: w.t }
		);
		await w.log(
			'landmark.record',
			{ kind: 'animal', id: animal.id },
			{ bundles: entered.map(({ bundle }) => partCode(animal.code, bundle)) }
		);
		return { ids: made.map(({ id }) => id) };
	});
}

/** Landmarks in force, oldest first. */
export async function list(by: Actor | null, animalCode: string): Promise<LandmarkRow[]> {
	demand(by, 'data.read');
	const animal = await animalOfCode(animalCode);
	const carriages = await carriagesOf(animal.id);
	const turns = await Turn.ofCarriages(carriages.map(({ id }) => id));
	const depthAt = new Map(
		carriages.flatMap((carriage) => {
			const { start, after } = standsOf(carriage, turns);
			return carriage.bundles.map(({ id }, i) => [
				id,
				(at: Date) =>
					(after.findLast(({ turn }) => turn.doneAt <= at)?.stand ?? start).bundles[i].depthUm
			]);
		})
	);
	const rows = await Landmark.findAll({
		where: { bundleId: [...depthAt.keys()], withdrawnAt: null },
		include: [{ association: 'bundle' }, { association: 'person', attributes: ['name'] }],
		order: [['seenAt', 'ASC']]
	});
	return rows.map((row) => ({
		id: row.id,
		bundleId: row.bundleId,
		bundle: row.bundle?.label ?? '',
		seenAt: row.seenAt,
		depthUm: depthAt.get(row.bundleId)?.(row.seenAt) ?? NaN,
		sharpWave: row.sharpWave,
		ripples: row.ripples,
		rippleUv: row.rippleUv,
		hasTheta: row.hasTheta,
		hasHash: row.hasHash,
		hasCells: row.hasCells,
		largestUv: row.largestUv,
		signConvention: row.signConvention,
		reference: row.reference,
		note: row.note,
		person: row.person?.name ?? '',
		isEnteredLater: row.isEnteredLater
	}));
}

/** Takes a landmark out of force; it stays readable with the reason. */
export async function withdraw(by: Actor | null, id: string, input: unknown): Promise<void> {
	demand(by, 'days.write');
	const { why } = parsed(withdrawalSchema, input);
	await write(by, async (w) => {
		const landmark = await Landmark.findByPk(id, { transaction: w.t, lock: true });
		if (!landmark || landmark.withdrawnAt) throw new NotFound();
		await landmark.update(
			{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: why },
			{ transaction: w.t }
		);
		await w.log('landmark.withdraw', { kind: 'landmark', id }, { why });
	});
}
