import { formatDay } from '$lib/format/date';
import { Conflict } from '$lib/server/errors';
import type { Animal } from '$lib/server/models/animal';
import { Bundle } from '$lib/server/models/bundle';
import { BundleRole } from '$lib/server/models/bundle-role';
import type { Implant } from '$lib/server/models/implant';
import { Turn } from '$lib/server/models/turn';
import type { Write } from '$lib/server/record';
import { carriagesOf } from './carriage-stands';
import { labClock } from './lab-clock';

/** Every row of the ledger of one implant. */
export async function turnsOf(animal: Animal, implant: Implant, { t }: Write): Promise<Turn[]> {
	const carriages = await carriagesOf(animal.id, t);
	const here = carriages.filter((carriage) => carriage.letter === implant.letter);
	return Turn.ofCarriages(
		here.map(({ id }) => id),
		t
	);
}

interface Corrected {
	surgeryDate: string;
	pitchUm: number;
	travelUm: number;
	backlashUm: number;
	isClockwiseLowering: boolean;
}

/**
 * What turns rest on stays: a new pitch would move every past depth without a trace.
 * @throws Conflict `screw-in-use`, `turned-before`
 */
export async function checkTurned(
	animal: Animal,
	implant: Implant,
	given: Corrected,
	w: Write
): Promise<void> {
	const [first] = await turnsOf(animal, implant, w);
	if (!first) return;
	const screw = ['pitchUm', 'travelUm', 'backlashUm', 'isClockwiseLowering'] as const;
	if (screw.some((name) => given[name] !== implant[name])) {
		throw new Conflict(
			'screw-in-use',
			'Turns are recorded with these figures of the screw, so they stay. Nothing was changed.'
		);
	}
	const { dayOf } = await labClock();
	const firstDay = dayOf(first.doneAt);
	if (given.surgeryDate > firstDay) {
		throw new Conflict(
			'turned-before',
			`A screw was turned on ${formatDay(firstDay)}, so the surgery was not later.`
		);
	}
}

/** Roles given at surgery begin with it, also when its day is put right. */
export async function moveFirstRoles(
	implant: Implant,
	surgeryDay: string,
	{ t: transaction }: Write
): Promise<void> {
	const bundles = await Bundle.findAll({ where: { implantId: implant.id }, transaction });
	const bundleId = bundles.map(({ id }) => id);
	await BundleRole.update(
		{ fromDay: surgeryDay },
		{ where: { bundleId, fromDay: implant.surgeryDay }, transaction }
	);
}
