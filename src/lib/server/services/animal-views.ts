import type { Includeable } from 'sequelize';
import type { AnimalFacts } from '$lib/components/animal/animal-facts';
import { dayAfter, daysBetween } from '$lib/format/day-count';
import { formatQuantity } from '$lib/format/number';
import type { AnimalStatus, Sex, Species } from '$lib/schemas/enumerations';
import type { Animal } from '$lib/server/models/animal';
import type { Implant } from '$lib/server/models/implant';
import { inForceOn } from '$lib/server/models/in-force';

/** A row of the list of animals. */
export interface AnimalRow {
	code: string;
	species: Species;
	strain: string;
	sex: Sex;
	birthDate: string | null;
	status: AnimalStatus;
	isSimulated: boolean;
	protocol: string | null;
	floorShare: number | null;
	baselineWeightG: number | null;
	projects: string[];
	/** The latest weight without the implant. */
	weight: { weightG: number; share: number | null; at: string } | null;
	implants: { letter: string; surgeryDay: string; dayNumber: number }[];
	lastSessionAt: string | null;
	withdrawn: { at: string; why: string } | null;
}

export interface Membership {
	id: string;
	name: string;
	from: string;
	until: string | null;
}

export interface ImplantCard {
	letter: string;
	surgeryDay: string;
	dayNumber: number;
	surgeon: string;
	summary: string;
	/** Last day the protocol allows it, where it sets a limit. */
	lastDay: string | null;
}

/** Everything known of one animal itself. */
export interface AnimalView extends Omit<AnimalRow, 'implants'> {
	id: string;
	source: string;
	note: string;
	revision: number;
	protocols: Membership[];
	projectMemberships: Membership[];
	implants: ImplantCard[];
}

/** What a row shows, in one query for each kind of thing, however many animals there are. */
export function rowIncludes(today: string): Includeable[] {
	return [
		{ association: 'protocols', where: inForceOn(today), separate: true, include: ['protocol'] },
		{ association: 'projects', where: inForceOn(today), separate: true, include: ['project'] },
		{ association: 'implants', where: { withdrawnAt: null }, separate: true, order: ['letter'] },
		latest('weights', 'measuredAt'),
		{ ...latest('sessions', 'startsAt'), attributes: ['id', 'animalId', 'startsAt'] }
	];
}

/** The same for one animal, with past memberships and what its implants are made of. */
export function viewIncludes(): Includeable[] {
	const bundles = { association: 'bundles', attributes: ['id', 'carriageId', 'kind'] };
	const parts = { association: 'carriages', attributes: ['id', 'siteId'], include: [bundles] };
	return [
		{ association: 'protocols', separate: true, include: ['protocol'], order: ['fromDay'] },
		{ association: 'projects', separate: true, include: ['project'], order: ['fromDay'] },
		{
			association: 'implants',
			where: { withdrawnAt: null },
			separate: true,
			order: ['letter'],
			include: [
				{ association: 'surgeon', attributes: ['name'] },
				{ association: 'sites', include: [parts] }
			]
		},
		latest('weights', 'measuredAt'),
		{ ...latest('sessions', 'startsAt'), attributes: ['id', 'animalId', 'startsAt'] }
	];
}

const latest = (association: string, column: string) => ({
	association,
	where: { withdrawnAt: null },
	separate: true,
	limit: 1,
	order: [[column, 'DESC']] as [string, string][]
});

export function toRow(animal: Animal, today: string): AnimalRow {
	const isNow = ({ fromDay, untilDay }: { fromDay: string; untilDay: string | null }) =>
		fromDay <= today && (!untilDay || untilDay > today);
	const protocol = animal.protocols?.find(isNow)?.protocol;
	const weight = animal.weights?.at(0);
	return {
		code: animal.code,
		species: animal.species,
		strain: animal.strain,
		sex: animal.sex,
		birthDate: animal.birthDate,
		status: animal.status,
		isSimulated: animal.isSimulated,
		protocol: protocol?.number ?? null,
		floorShare: protocol ? protocol.weightFloorPercent / 100 : null,
		baselineWeightG: animal.baselineWeightG,
		projects: (animal.projects ?? []).filter(isNow).map(({ project }) => project?.name ?? ''),
		weight: weight
			? {
					weightG: weight.netG,
					share: animal.baselineWeightG ? weight.netG / animal.baselineWeightG : null,
					at: weight.measuredAt.toISOString()
				}
			: null,
		implants: (animal.implants ?? []).map(({ letter, surgeryDay }) => ({
			letter,
			surgeryDay,
			dayNumber: daysBetween(surgeryDay, today)
		})),
		lastSessionAt: animal.sessions?.at(0)?.startsAt.toISOString() ?? null,
		withdrawn: animal.withdrawnAt && {
			at: animal.withdrawnAt.toISOString(),
			why: animal.withdrawnWhy ?? ''
		}
	};
}

export function toView(animal: Animal, today: string): AnimalView {
	const { id, source, note, revision } = animal;
	return {
		...toRow(animal, today),
		...{ id, source, note, revision },
		protocols: (animal.protocols ?? []).map((row) => ({
			id: row.id,
			name: row.protocol?.number ?? '',
			from: row.fromDay,
			until: row.untilDay
		})),
		projectMemberships: (animal.projects ?? []).map((row) => ({
			id: row.id,
			name: row.project?.name ?? '',
			from: row.fromDay,
			until: row.untilDay
		})),
		implants: (animal.implants ?? []).map((implant) => toCard(animal, implant, today))
	};
}

function toCard(animal: Animal, implant: Implant, today: string): ImplantCard {
	const limits = animal.protocols?.find(
		({ fromDay, untilDay }) => fromDay <= today && (!untilDay || untilDay > today)
	);
	const longest = limits?.protocol?.longestImplantDays ?? null;
	return {
		letter: implant.letter,
		surgeryDay: implant.surgeryDay,
		dayNumber: daysBetween(implant.surgeryDay, today),
		surgeon: implant.surgeon?.name ?? '',
		summary: summaryOf(implant),
		lastDay: longest === null ? null : dayAfter(implant.surgeryDay, longest)
	};
}

/** "right dorsal CA1, 16 tetrodes". */
export function summaryOf(implant: Implant): string {
	const sites = implant.sites ?? [];
	const kinds = sites
		.flatMap((site) => site.carriages ?? [])
		.flatMap((carriage) => carriage.bundles ?? [])
		.map((bundle) => bundle.kind.replace('-', ' '));
	const counts = [...new Set(kinds)].map((kind) =>
		formatQuantity(kinds.filter((other) => other === kind).length, kind)
	);
	return [sites.map((site) => site.label).join(' and '), ...counts].filter(Boolean).join(', ');
}

/** The head of every animal page. */
export function toHeader(view: AnimalView): AnimalFacts {
	const [implant] = view.implants;
	return {
		code: view.code,
		species: view.species,
		strain: view.strain || null,
		sex: view.sex === 'unknown' ? null : view.sex,
		birthDate: view.birthDate,
		protocol: view.protocol,
		floorShare: view.floorShare,
		weight: view.weight,
		implant: implant ? { summary: implant.summary, surgeon: implant.surgeon } : null
	};
}
