import { col, fn, Op, where } from 'sequelize';
import { v7 as uuidv7 } from 'uuid';
import type { NewImplant } from '$lib/schemas/implant';
import { pitchOfThread } from '$lib/schemas/drive-threads';
import { demand, type Actor } from '$lib/server/access';
import { Invalid } from '$lib/server/errors';
import { Bundle } from '$lib/server/models/bundle';
import { BundleRole } from '$lib/server/models/bundle-role';
import { Carriage } from '$lib/server/models/carriage';
import { Channel } from '$lib/server/models/channel';
import { Drive } from '$lib/server/models/drive';
import { DriveDesign } from '$lib/server/models/drive-design';
import type { Implant } from '$lib/server/models/implant';
import { Site } from '$lib/server/models/site';
import type { Write } from '$lib/server/record';

const lower = (name: string, value: string) => ({
	[Op.and]: where(fn('lower', col(name)), value.trim().toLowerCase())
});

/** The design named, or a new one when it is given in full, which only registers' writers may. */
export async function designOf(
	by: Actor,
	w: Write,
	given: NewImplant['driveDesign']
): Promise<DriveDesign> {
	if (typeof given !== 'string') {
		demand(by, 'registers.write');
		const { revision: _, ...design } = given;
		const pitchUm = design.pitchUm || pitchOfThread(design.thread);
		const made = await DriveDesign.create(
			{ ...design, pitchUm: pitchUm ?? NaN },
			{ transaction: w.t }
		);
		await w.log('drive-design.create', { kind: 'drive-design', id: made.id }, { name: made.name });
		return made;
	}
	const design = await DriveDesign.findOne({
		where: { withdrawnAt: null, ...lower('name', given) },
		transaction: w.t
	});
	if (design) return design;
	const message = `The lab has no drive design “${given}”. A PI adds it on the Lab page.`;
	throw new Invalid([{ field: 'driveDesign', message }]);
}

export async function driveOf(
	w: Write,
	design: DriveDesign,
	serial: string
): Promise<Drive | null> {
	if (serial === '') return null;
	const drive = await Drive.findOne({
		where: { designId: design.id, withdrawnAt: null, ...lower('serial', serial) },
		transaction: w.t
	});
	if (drive) return drive;
	const message = `No drive “${serial}” of the design ${design.name} is on the Lab page.`;
	throw new Invalid([{ field: 'drive', message }]);
}

/** Sites, carriages, bundles, their first roles and channels, each kind in one statement. */
export async function insertParts(
	{ t: transaction }: Write,
	implant: Implant,
	given: NewImplant['sites']
): Promise<number> {
	const implantId = implant.id;
	const sites = given.map((site) => ({ ...site, id: uuidv7() }));
	const carriages = sites
		.flatMap((site) => site.carriages.map((carriage) => ({ ...carriage, siteId: site.id })))
		.map((carriage, at) => ({ ...carriage, id: uuidv7(), screwOrder: at + 1 }));
	const bundles = carriages.flatMap((carriage) =>
		carriage.bundles.map((bundle) => ({ ...bundle, id: uuidv7(), carriageId: carriage.id }))
	);
	await Site.bulkCreate(
		sites.map(({ id, label, targetLayer, layerBands }) => ({
			...{ id, label, targetLayer, layerBands, implantId }
		})),
		{ transaction }
	);
	await Carriage.bulkCreate(
		carriages.map(({ id, siteId, label, screwOrder, startScrewUm }) => ({
			...{ id, siteId, label, screwOrder, startScrewUm, implantId }
		})),
		{ transaction }
	);
	await Bundle.bulkCreate(
		bundles.map(({ role: _role, targetLayer: _layer, channels: _channels, ...bundle }) => ({
			...bundle,
			implantId
		})),
		{ transaction }
	);
	await BundleRole.bulkCreate(
		bundles.map(({ id, role, targetLayer }) => ({
			...{ bundleId: id, role, targetLayer, fromDay: implant.surgeryDay }
		})),
		{ transaction }
	);
	await Channel.bulkCreate(
		bundles.flatMap(({ id, channels }) =>
			Array.from({ length: channels }, (_, at) => ({ bundleId: id, number: at + 1 }))
		),
		{ transaction }
	);
	return bundles.length;
}
