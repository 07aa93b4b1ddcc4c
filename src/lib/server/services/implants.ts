import { implantEditSchema, implantSchema, roleChangeSchema } from '$lib/schemas/implant';
import { withdrawalSchema } from '$lib/schemas/field-rules';
import { demand, may, personOf, type Actor } from '$lib/server/access';
import { now } from '$lib/server/clock';
import { Conflict, Invalid, NotFound, Stale } from '$lib/server/errors';
import type { Animal } from '$lib/server/models/animal';
import { Bundle } from '$lib/server/models/bundle';
import { BundleRole } from '$lib/server/models/bundle-role';
import { Implant } from '$lib/server/models/implant';
import { inForceOn } from '$lib/server/models/in-force';
import { Site } from '$lib/server/models/site';
import { Turn } from '$lib/server/models/turn';
import { parsed } from '$lib/server/parsed';
import { record, type Write } from '$lib/server/record';
import { animalOfCode } from './animal-of-code';
import { carriagesOf, standsOf, type Stand } from './carriage-stands';
import { checkTurned, moveFirstRoles, turnsOf } from './implant-corrections';
import { checkLimits } from './implant-limits';
import { designOf, driveOf, insertParts } from './implant-parts';
import { implantIncludes, toImplantView, type ImplantView } from './implant-views';
import { today } from './lab-clock';

export async function list(by: Actor | null, animalCode: string): Promise<ImplantView[]> {
	demand(by, 'animals.read');
	return viewsOf(by, await animalOfCode(animalCode));
}

export async function get(
	by: Actor | null,
	animalCode: string,
	letter: string
): Promise<ImplantView> {
	demand(by, 'animals.read');
	const views = await viewsOf(by, await animalOfCode(animalCode), letter.toUpperCase());
	if (views.length === 0) throw new NotFound();
	return views[0];
}

/** @throws Conflict when the protocol does not cover the surgery; Invalid naming what is wrong */
export async function create(
	by: Actor | null,
	animalCode: string,
	input: unknown
): Promise<{ id: string; letter: string }> {
	demand(by, 'implants.write');
	const given = parsed(implantSchema, input);
	const day = await today();
	if (given.surgeryDate > day) throw notYet();
	return record(by, async (w) => {
		const animal = await animalOfCode(animalCode, w.t);
		const surgeonId = given.surgeon ?? personOf(by);
		const planned = { animalId: animal.id, surgeryDay: given.surgeryDate, surgeonId };
		await checkLimits(planned, day, w.t);
		const design = await designOf(by, w, given.driveDesign);
		const drive = await driveOf(w, design, given.drive);
		const implant = await Implant.create(
			{
				...planned,
				letter: await nextLetter(animal.id, w),
				driveDesignId: design.id,
				driveId: drive?.id ?? null,
				pitchUm: drive?.measuredPitchUm ?? design.pitchUm,
				travelUm: design.travelMm * 1000,
				backlashUm: design.backlashUm,
				smallestStepTurns: design.smallestStepTurns,
				isClockwiseLowering: design.isClockwiseLowering,
				massG: given.massG ?? drive?.massG ?? null,
				note: given.note
			},
			{ transaction: w.t }
		);
		const bundles = await insertParts(w, implant, given.sites);
		const { id, letter, surgeryDay } = implant;
		const detail = { animal: animal.code, letter, surgeryDay, bundles };
		await w.log('implant.create', { kind: 'implant', id }, detail);
		return { id, letter };
	});
}

/** @throws Conflict `stale`, `screw-in-use`, `turned-before`, or when the protocol does not cover it */
export async function edit(
	by: Actor | null,
	animalCode: string,
	letter: string,
	input: unknown
): Promise<void> {
	demand(by, 'implants.write');
	const { revision, sites, bundles, ...given } = parsed(implantEditSchema, input);
	const day = await today();
	if (given.surgeryDate > day) throw notYet();
	await record(by, async (w) => {
		const { animal, implant } = await found(w, animalCode, letter);
		const { surgeryDate: surgeryDay, surgeon: surgeonId, ...facts } = given;
		await checkTurned(animal, implant, given, w);
		if (surgeryDay !== implant.surgeryDay || surgeonId !== implant.surgeonId) {
			const planned = { animalId: animal.id, surgeryDay, surgeonId, implantId: implant.id };
			await checkLimits(planned, day, w.t);
			await moveFirstRoles(implant, surgeryDay, w);
		}
		const [changed] = await Implant.update(
			{ ...facts, surgeryDay, surgeonId, revision: revision + 1 },
			{ where: { id: implant.id, revision }, transaction: w.t }
		);
		if (changed === 0) throw new Stale('implant');
		const here = { implantId: implant.id };
		for (const { id, ...site } of sites) {
			await Site.update(site, { where: { id, ...here }, transaction: w.t });
		}
		for (const { id, ...bundle } of bundles) {
			await Bundle.update(bundle, { where: { id, ...here }, transaction: w.t });
		}
		const was = { surgeryDay: implant.surgeryDay, massG: implant.massG, pitchUm: implant.pitchUm };
		const detail = { animal: animal.code, letter: implant.letter, was };
		await w.log('implant.edit', { kind: 'implant', id: implant.id }, detail);
	});
}

/** Gives a bundle another role from a day on. */
export async function changeRole(
	by: Actor | null,
	animalCode: string,
	letter: string,
	input: unknown
): Promise<void> {
	demand(by, 'implants.write');
	const { bundleId, role, targetLayer, from: fromDay } = parsed(roleChangeSchema, input);
	await record(by, async (w) => {
		const { implant } = await found(w, animalCode, letter);
		const bundle = await Bundle.findOne({
			where: { id: bundleId, implantId: implant.id },
			transaction: w.t
		});
		if (!bundle) throw new NotFound();
		if (fromDay < implant.surgeryDay) {
			const message = `The bundle is in the animal since ${implant.surgeryDay}.`;
			throw new Invalid([{ field: 'from', message }]);
		}
		const where = { bundleId, ...inForceOn(fromDay) };
		const before = await BundleRole.findOne({ where, transaction: w.t });
		const untilDay = before?.untilDay ?? null;
		await before?.update({ untilDay: fromDay }, { transaction: w.t });
		await BundleRole.create(
			{ bundleId, role, targetLayer, fromDay, untilDay },
			{ transaction: w.t }
		);
		const detail = { bundle: bundle.label, role, from: fromDay, was: before?.role ?? null };
		await w.log('bundle.change-role', { kind: 'bundle', id: bundleId }, detail);
	});
}

/** Takes out an implant entered by mistake; one that was turned stays, as cells depend on it. */
export async function withdraw(
	by: Actor | null,
	animalCode: string,
	letter: string,
	input: unknown
): Promise<void> {
	demand(by, 'implants.write');
	const { why } = parsed(withdrawalSchema, input);
	await record(by, async (w) => {
		const { animal, implant } = await found(w, animalCode, letter);
		if ((await turnsOf(animal, implant, w)).length > 0) {
			throw new Conflict('turned', 'Turns are recorded on this implant, so it stays on record.');
		}
		await implant.update(
			{ withdrawnAt: now(), withdrawnBy: by.personId, withdrawnWhy: why },
			{ transaction: w.t }
		);
		await w.log('implant.withdraw', { kind: 'implant', id: implant.id }, { why });
	});
}

function notYet(): Invalid {
	const message = 'An implant is entered on the day of its surgery or later.';
	return new Invalid([{ field: 'surgeryDate', message }]);
}

async function found(w: Write, animalCode: string, letter: string) {
	const animal = await animalOfCode(animalCode, w.t);
	const implant = await Implant.findOne({
		where: { animalId: animal.id, letter: letter.toUpperCase(), withdrawnAt: null },
		transaction: w.t
	});
	if (!implant) throw new NotFound();
	return { animal, implant };
}

async function viewsOf(by: Actor, animal: Animal, letter?: string): Promise<ImplantView[]> {
	const [implants, day, stands] = await Promise.all([
		Implant.findAll({
			where: { animalId: animal.id, withdrawnAt: null, ...(letter && { letter }) },
			include: implantIncludes,
			order: ['letter']
		}),
		today(),
		may(by, 'data.read') ? standsNow(animal) : null
	]);
	return implants.map((implant) => toImplantView(animal, implant, stands, day));
}

async function standsNow(animal: Animal): Promise<Map<string, Stand>> {
	const carriages = await carriagesOf(animal.id);
	const turns = await Turn.ofCarriages(carriages.map(({ id }) => id));
	return new Map(
		carriages.map((carriage) => {
			const { start, after } = standsOf(carriage, turns);
			return [carriage.id, after.at(-1)?.stand ?? start];
		})
	);
}

/** The first letter no implant of the animal has. */
async function nextLetter(animalId: string, { t: transaction }: Write): Promise<string> {
	const implants = await Implant.findAll({ where: { animalId, withdrawnAt: null }, transaction });
	const taken = new Set(implants.map(({ letter }) => letter));
	const letters = Array.from({ length: 26 }, (_, at) => String.fromCharCode(65 + at));
	const free = letters.find((letter) => !taken.has(letter));
	if (free) return free;
	throw new Conflict(
		'letters-used',
		'All letters from A to Z are used for implants of this animal.'
	);
}
