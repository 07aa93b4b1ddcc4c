import type { Transaction } from 'sequelize';
import { foldTurns } from '$lib/analysis/geometry/fold-turns';
import { rowsInForce } from '$lib/analysis/geometry/rows-in-force';
import { Bundle } from '$lib/server/models/bundle';
import { Carriage } from '$lib/server/models/carriage';
import { Implant } from '$lib/server/models/implant';
import { Site } from '$lib/server/models/site';
import { type Turn } from '$lib/server/models/turn';

/** A carriage with what its implant keeps about the screw, and the bundles it moves. */
export interface CarriageFacts {
	id: string;
	label: string;
	/** Of the implant. */
	letter: string;
	site: string;
	screwOrder: number;
	surgeryDay: string;
	startUm: number;
	pitchUm: number;
	travelUm: number;
	backlashUm: number;
	smallestStepTurns: number;
	bundles: BundleFacts[];
}

export interface BundleFacts {
	id: string;
	label: string;
	/** Of the implant. */
	letter: string;
	startDepthUm: number;
}

/** Where screw, carriage and bundles stand at a moment. */
export interface Stand {
	screwUm: number;
	carriageUm: number;
	travelLeftUm: number;
	/** Of the carriage's first bundle; null when it moves none. */
	depthUm: number | null;
	bundles: { id: string; label: string; depthUm: number }[];
}

export async function carriagesOf(
	animalId: string,
	transaction?: Transaction
): Promise<CarriageFacts[]> {
	const implants = await Implant.findAll({
		where: { animalId, withdrawnAt: null },
		include: {
			model: Site,
			as: 'sites',
			include: [
				{
					model: Carriage,
					as: 'carriages',
					include: [{ model: Bundle, as: 'bundles' }]
				}
			]
		},
		order: [
			['letter', 'ASC'],
			['sites', 'carriages', 'screwOrder', 'ASC'],
			['sites', 'carriages', 'bundles', 'label', 'ASC']
		],
		transaction
	});
	return implants.flatMap((implant) =>
		(implant.sites ?? []).flatMap((site) =>
			(site.carriages ?? []).map((carriage) => factsOf(implant, site, carriage))
		)
	);
}

/** The animal's bundles, in the order of the screws. */
export async function bundlesOf(
	animalId: string,
	transaction?: Transaction
): Promise<BundleFacts[]> {
	return (await carriagesOf(animalId, transaction)).flatMap(({ bundles }) => bundles);
}

function factsOf(implant: Implant, site: Site, carriage: Carriage): CarriageFacts {
	const { letter, surgeryDay, pitchUm, travelUm, backlashUm, smallestStepTurns } = implant;
	return {
		id: carriage.id,
		label: carriage.label,
		letter,
		site: site.label,
		screwOrder: carriage.screwOrder,
		surgeryDay,
		startUm: carriage.startScrewUm,
		pitchUm,
		travelUm,
		backlashUm,
		smallestStepTurns,
		bundles: (carriage.bundles ?? []).map(({ id, label, startDepthUm }) => ({
			id,
			label,
			letter,
			startDepthUm
		}))
	};
}

/** The carriage's stand before its first turn and after each turn in force, oldest first. */
export function standsOf(
	carriage: CarriageFacts,
	rows: readonly Turn[]
): { start: Stand; after: { turn: Turn; stand: Stand }[] } {
	const inForce = rowsInForce(rows.filter(({ carriageId }) => carriageId === carriage.id));
	const { screwUm, carriageUm } = foldTurns(
		inForce.map(({ turns }) => turns),
		carriage
	);
	return {
		start: standAt(carriage, carriage.startUm, carriage.startUm),
		after: inForce.map((turn, i) => ({
			turn,
			stand: standAt(carriage, screwUm[i], carriageUm[i])
		}))
	};
}

function standAt(carriage: CarriageFacts, screwUm: number, carriageUm: number): Stand {
	// Depth grows from where the bundle stood at surgery by what the carriage has moved since.
	const bundles = carriage.bundles.map(({ id, label, startDepthUm }) => ({
		id,
		label,
		depthUm: startDepthUm + carriageUm - carriage.startUm
	}));
	return {
		screwUm,
		carriageUm,
		travelLeftUm: carriage.travelUm - carriageUm,
		depthUm: bundles[0]?.depthUm ?? null,
		bundles
	};
}
