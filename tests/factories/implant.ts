import type { CreationAttributes } from 'sequelize';
import { Bundle } from '$lib/server/models/bundle';
import { BundleRole } from '$lib/server/models/bundle-role';
import { Carriage } from '$lib/server/models/carriage';
import { Channel } from '$lib/server/models/channel';
import { Implant } from '$lib/server/models/implant';
import { Site } from '$lib/server/models/site';
import { makeAnimal } from './animal';
import { makeDriveDesign } from './drive-design';
import { makePerson } from './person';

export interface MadeImplant {
	implant: Implant;
	site: Site;
	/** One a bundle, in the order of the screws. */
	carriages: Carriage[];
	/** T01 onward, each alone on its carriage, recording since surgery. */
	bundles: Bundle[];
}

/** An implant of one site with `tetrodes` (16) carriages of one tetrode each. */
export async function makeImplant({
	tetrodes = 16,
	...fields
}: Partial<CreationAttributes<Implant>> & { tetrodes?: number } = {}): Promise<MadeImplant> {
	const implant = await Implant.create({
		animalId: fields.animalId ?? (await makeAnimal()).id,
		letter: 'A',
		surgeryDay: '2026-03-01',
		surgeonId: fields.surgeonId ?? (await makePerson({ roles: ['surgeon'] })).id,
		driveDesignId: fields.driveDesignId ?? (await makeDriveDesign()).id,
		pitchUm: 317.5,
		travelUm: 5000,
		backlashUm: 40,
		smallestStepTurns: 0.0625,
		isClockwiseLowering: true,
		massG: 18,
		...fields
	});
	const site = await Site.create({
		implantId: implant.id,
		label: 'right dorsal CA1',
		targetLayer: 'CA1 pyramidal'
	});
	const numbers = Array.from({ length: tetrodes }, (_, i) => i + 1);
	const label = (prefix: string, n: number) => prefix + String(n).padStart(2, '0');
	const carriages = await Carriage.bulkCreate(
		numbers.map((n) => ({
			siteId: site.id,
			implantId: implant.id,
			label: label('C', n),
			screwOrder: n
		}))
	);
	const bundles = await Bundle.bulkCreate(
		carriages.map((carriage, i) => ({
			carriageId: carriage.id,
			implantId: implant.id,
			label: label('T', i + 1),
			kind: 'tetrode' as const
		}))
	);
	await BundleRole.bulkCreate(
		bundles.map((bundle) => ({
			bundleId: bundle.id,
			role: 'record' as const,
			fromDay: implant.surgeryDay
		}))
	);
	await Channel.bulkCreate(
		bundles.flatMap((bundle) => [1, 2, 3, 4].map((number) => ({ bundleId: bundle.id, number })))
	);
	return { implant, site, carriages, bundles };
}
