import { daysBetween } from '$lib/format/day-count';
import { partCode } from '$lib/format/part-code';
import type { BundleKind, BundleRoleName, DepthZero } from '$lib/schemas/enumerations';
import type { LayerBand } from '$lib/schemas/layer-band';
import type { Animal } from '$lib/server/models/animal';
import type { Bundle } from '$lib/server/models/bundle';
import type { Carriage } from '$lib/server/models/carriage';
import type { Implant } from '$lib/server/models/implant';
import type { Stand } from './carriage-stands';

export interface BundleView {
	id: string;
	label: string;
	/** "R031-T07". */
	code: string;
	kind: BundleKind;
	channels: number;
	role: BundleRoleName | null;
	targetLayer: string;
	entryApMm: number | null;
	entryMlMm: number | null;
	tiltDeg: number;
	azimuthDeg: number;
	startDepthUm: number;
	zero: DepthZero;
	zeroUncertaintyUm: number | null;
	/** Along the track from the zero; null for readers who do not see what the electrodes gave. */
	depthUm: number | null;
}

export interface CarriageView {
	id: string;
	label: string;
	screwOrder: number;
	screwUm: number | null;
	travelLeftUm: number | null;
	bundles: BundleView[];
}

export interface SiteView {
	id: string;
	label: string;
	targetLayer: string;
	layerBands: LayerBand[];
	carriages: CarriageView[];
}

export interface ImplantView {
	id: string;
	animal: string;
	isSimulated: boolean;
	letter: string;
	surgeryDay: string;
	dayNumber: number;
	surgeon: { id: string; name: string };
	driveDesign: string;
	drive: string | null;
	pitchUm: number;
	travelUm: number;
	backlashUm: number;
	smallestStepTurns: number;
	isClockwiseLowering: boolean;
	massG: number | null;
	note: string;
	revision: number;
	sites: SiteView[];
}

export const implantIncludes = [
	{ association: 'surgeon', attributes: ['id', 'name'] },
	{ association: 'driveDesign', attributes: ['name'] },
	{ association: 'drive', attributes: ['serial'] },
	{
		association: 'sites',
		include: [
			{
				association: 'carriages',
				include: [
					{
						association: 'bundles',
						include: [
							{ association: 'roles', separate: true },
							{ association: 'channels', separate: true, attributes: ['id', 'bundleId'] }
						]
					}
				]
			}
		]
	}
];

export function toImplantView(
	animal: Animal,
	implant: Implant,
	stands: Map<string, Stand> | null,
	today: string
): ImplantView {
	const bundleView = (bundle: Bundle, stand: Stand | undefined): BundleView => {
		const role = bundle.roles?.find(
			({ fromDay, untilDay }) => fromDay <= today && (!untilDay || untilDay > today)
		);
		return {
			id: bundle.id,
			label: bundle.label,
			code: partCode(animal.code, { letter: implant.letter, label: bundle.label }),
			kind: bundle.kind,
			channels: bundle.channels?.length ?? 0,
			role: role?.role ?? null,
			targetLayer: role?.targetLayer ?? '',
			entryApMm: bundle.entryApMm,
			entryMlMm: bundle.entryMlMm,
			tiltDeg: bundle.tiltDeg,
			azimuthDeg: bundle.azimuthDeg,
			startDepthUm: bundle.startDepthUm,
			zero: bundle.zero,
			zeroUncertaintyUm: bundle.zeroUncertaintyUm,
			depthUm: stand?.bundles.find(({ id }) => id === bundle.id)?.depthUm ?? null
		};
	};
	const carriageView = (carriage: Carriage): CarriageView => {
		const stand = stands?.get(carriage.id);
		return {
			id: carriage.id,
			label: carriage.label,
			screwOrder: carriage.screwOrder,
			screwUm: stand?.screwUm ?? null,
			travelLeftUm: stand?.travelLeftUm ?? null,
			bundles: byLabel(carriage.bundles ?? []).map((bundle) => bundleView(bundle, stand))
		};
	};
	const { id, letter, surgeryDay, pitchUm, travelUm, backlashUm, smallestStepTurns } = implant;
	const { isClockwiseLowering, massG, note, revision } = implant;
	const screwOf = (site: SiteView) => site.carriages[0]?.screwOrder ?? 0;
	return {
		...{ id, letter, surgeryDay, pitchUm, travelUm, backlashUm, smallestStepTurns },
		...{ isClockwiseLowering, massG, note, revision },
		animal: animal.code,
		isSimulated: animal.isSimulated,
		dayNumber: daysBetween(surgeryDay, today),
		surgeon: { id: implant.surgeonId, name: implant.surgeon?.name ?? '' },
		driveDesign: implant.driveDesign?.name ?? '',
		drive: implant.drive?.serial ?? null,
		sites: (implant.sites ?? [])
			.map((site) => ({
				id: site.id,
				label: site.label,
				targetLayer: site.targetLayer,
				layerBands: site.layerBands,
				carriages: (site.carriages ?? [])
					.map(carriageView)
					.toSorted((a, b) => a.screwOrder - b.screwOrder)
			}))
			.toSorted((a, b) => screwOf(a) - screwOf(b))
	};
}

function byLabel(bundles: Bundle[]): Bundle[] {
	return bundles.toSorted((a, b) => a.label.localeCompare(b.label, 'en', { numeric: true }));
}
