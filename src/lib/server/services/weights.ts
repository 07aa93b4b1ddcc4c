import { formatDay } from '$lib/format/date';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { weightSchema, type WeightInput } from '$lib/schemas/weight';
import { demand, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, Invalid, NotFound } from '$lib/server/errors';
import { AnimalProtocol } from '$lib/server/models/animal-protocol';
import { Implant } from '$lib/server/models/implant';
import { Weight } from '$lib/server/models/weight';
import { parsed } from '$lib/server/parsed';
import { record as write } from '$lib/server/record';
import { animalOfCode } from './animal-of-code';
import { labClock } from './lab-clock';

/** One weighing against what the animal weighed at first and what its protocol allows. */
export interface WeightRow {
	id: string;
	day: string;
	measuredAt: string;
	grossG: number;
	implantMassG: number;
	netG: number;
	/** Of the baseline; null without one. */
	share: number | null;
	/** The floor of the protocol in force on that day. */
	floorG: number | null;
	isBelowFloor: boolean;
	person: string;
	note: string;
	isEnteredLater: boolean;
	withdrawn: { at: string; why: string } | null;
}

/** Enters a weighing; the mass of the implants carried on that day is taken off. */
export async function record(
	by: Actor | null,
	animalCode: string,
	input: WeightInput
): Promise<{ id: string; netG: number }> {
	demand(by, 'weights.write');
	const entry = parsed(weightSchema, input);
	const clock = await labClock();
	const measuredAt = entry.measuredAt ?? now();
	if (measuredAt.getTime() > now().getTime() + 60_000) {
		throw new Invalid([
			{ field: 'measuredAt', message: 'A weight is entered once it is measured.' }
		]);
	}
	return write(by, async (w) => {
		const animal = await animalOfCode(animalCode, w.t);
		const day = clock.dayOf(measuredAt);
		const implantMassG = entry.implantMassG ?? (await carriedMass(animal.id, day));
		if (entry.grossG <= implantMassG) {
			const message = `The implants alone weigh ${implantMassG} g. Weigh again, or correct their mass on the implant's page.`;
			throw new Invalid([{ field: 'grossG', message }]);
		}
		const weight = await Weight.create(
			{
				animalId: animal.id,
				measuredAt,
				grossG: entry.grossG,
				implantMassG,
				measuredBy: personOf(by),
				note: entry.note,
				enteredAt: now(),
				isEnteredLater: day < clock.today
			},
			{ transaction: w.t }
		);
		const netG = entry.grossG - implantMassG;
		const detail = { animal: animal.code, grossG: entry.grossG, implantMassG, netG };
		await w.log('weight.record', { kind: 'weight', id: weight.id }, detail);
		return { id: weight.id, netG };
	});
}

async function carriedMass(animalId: string, day: string): Promise<number> {
	const implants = await Implant.findAll({ where: { animalId, withdrawnAt: null } });
	return implants
		.filter((implant) => implant.surgeryDay <= day)
		.reduce((sum, implant) => sum + (implant.massG ?? 0), 0);
}

/** Every weighing, oldest first; withdrawn ones are marked. */
export async function list(by: Actor | null, animalCode: string): Promise<WeightRow[]> {
	demand(by, 'animals.read');
	const animal = await animalOfCode(animalCode);
	const { dayOf } = await labClock();
	const [weights, stays] = await Promise.all([
		Weight.findAll({
			where: { animalId: animal.id },
			include: [{ association: 'measurer', attributes: ['name'] }],
			order: ['measuredAt']
		}),
		AnimalProtocol.findAll({ where: { animalId: animal.id }, include: ['protocol'] })
	]);
	return weights.map((weight) => {
		const day = dayOf(weight.measuredAt);
		const stay = stays.find((row) => row.fromDay <= day && (!row.untilDay || row.untilDay > day));
		const baselineG = animal.baselineWeightG;
		const floorPercent = stay?.protocol?.weightFloorPercent;
		const floorG = baselineG && floorPercent ? (baselineG * floorPercent) / 100 : null;
		return {
			id: weight.id,
			day,
			measuredAt: weight.measuredAt.toISOString(),
			grossG: weight.grossG,
			implantMassG: weight.implantMassG,
			netG: weight.netG,
			share: baselineG ? weight.netG / baselineG : null,
			floorG,
			isBelowFloor: floorG !== null && weight.netG < floorG,
			person: weight.measurer?.name ?? '',
			note: weight.note,
			isEnteredLater: weight.isEnteredLater,
			withdrawn: weight.withdrawnAt && {
				at: weight.withdrawnAt.toISOString(),
				why: weight.withdrawnWhy ?? ''
			}
		};
	});
}

/** Takes a wrong figure out of the curve; it stays readable with the reason. */
export async function withdraw(
	by: Actor | null,
	animalCode: string,
	id: string,
	input: { why: string }
): Promise<void> {
	demand(by, 'weights.write');
	const { why } = parsed(withdrawalSchema, input);
	await write(by, async (w) => {
		const animal = await animalOfCode(animalCode, w.t);
		const weight = await Weight.findOne({ where: { id, animalId: animal.id }, transaction: w.t });
		if (!weight) throw new NotFound();
		if (weight.withdrawnAt) {
			const on = formatDay(weight.withdrawnAt.toISOString().slice(0, 10));
			throw new Conflict('withdrawn', `This weight was withdrawn on ${on}.`);
		}
		await weight.update(
			{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: why },
			{ transaction: w.t }
		);
		await w.log('weight.withdraw', { kind: 'weight', id }, { animal: animal.code, why });
	});
}
