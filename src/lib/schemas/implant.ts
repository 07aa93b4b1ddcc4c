import { z } from 'zod';
import { BUNDLE_KINDS, BUNDLE_ROLES, DEPTH_ZEROS } from './enumerations';
import { countOf, daySchema, figureOf, lineOf, revisionSchema, textOf } from './field-rules';
import { layerBandSchema } from './layer-band';
import { driveDesignSchema } from './registers/drive-design';

const labelSchema = z
	.string()
	.trim()
	.regex(/^[A-Za-z0-9][A-Za-z0-9_.-]{0,23}$/, 'A label is like T07: letters, figures, _ . -');

/** Where a bundle goes in and how it was placed; the same when it is made and when corrected. */
const placing = {
	entryApMm: figureOf(-50, 50, 'mm').nullable().default(null),
	entryMlMm: figureOf(-50, 50, 'mm').nullable().default(null),
	/** From vertical; the azimuth says where the tip heads, from +AP towards +ML. */
	tiltDeg: figureOf(0, 90, '°').default(0),
	azimuthDeg: figureOf(-360, 360, '°').default(0),
	startDepthUm: figureOf(-5000, 20_000, 'µm').default(0),
	zero: z.enum(DEPTH_ZEROS).default('dura'),
	zeroUncertaintyUm: figureOf(0, 5000, 'µm').nullable().default(null)
};

export const bundleSchema = z.object({
	label: labelSchema,
	kind: z.enum(BUNDLE_KINDS),
	role: z.enum(BUNDLE_ROLES).default('record'),
	targetLayer: textOf(60),
	/** How many. */
	channels: countOf(0, 1024),
	...placing
});

export const carriageSchema = z.object({
	label: lineOf(40),
	startScrewUm: figureOf(0, 50_000, 'µm').default(0),
	bundles: z.array(bundleSchema).min(1, 'A carriage moves one bundle or more.')
});

export const siteSchema = z.object({
	label: lineOf(60),
	targetLayer: textOf(60),
	layerBands: z.array(layerBandSchema).default([]),
	/** In the order of the screws seen from above. */
	carriages: z.array(carriageSchema).min(1, 'A site has one carriage or more.')
});

export const implantSchema = z
	.object({
		surgeryDate: daySchema,
		/** Id of the person; whoever enters it when left out. */
		surgeon: z.uuid().nullable().default(null),
		/** Name of a design of the lab, or a new one in full. */
		driveDesign: z.union([z.string().trim().min(1), driveDesignSchema], {
			error: 'Name a drive design of the lab.'
		}),
		/** Serial of the drive; its own pitch and mass are taken where they were measured. */
		drive: textOf(60),
		massG: figureOf(0.01, 500, 'g').nullable().default(null),
		note: textOf(4000),
		sites: z.array(siteSchema).min(1, 'An implant has one site or more.')
	})
	.superRefine(({ sites }, context) => {
		const carriages = sites.flatMap((site) => site.carriages);
		const twice = (what: string, labels: string[]) => {
			const lower = labels.map((label) => label.toLowerCase());
			const at = lower.findIndex((label, n) => lower.indexOf(label) !== n);
			if (at < 0) return;
			const message = `Two ${what} are called ${labels[at]}.`;
			context.addIssue({ code: 'custom', path: ['sites'], message });
		};
		twice(
			'sites',
			sites.map((site) => site.label)
		);
		twice(
			'carriages',
			carriages.map((carriage) => carriage.label)
		);
		twice(
			'bundles',
			carriages.flatMap(({ bundles }) => bundles.map((bundle) => bundle.label))
		);
	});

export type ImplantInput = z.input<typeof implantSchema>;
export type NewImplant = z.output<typeof implantSchema>;

/** What may be put right later. The figures of the screw stand once a turn was made with them. */
export const implantEditSchema = z.object({
	surgeryDate: daySchema,
	surgeon: z.uuid({ error: 'Choose the surgeon.' }),
	massG: figureOf(0.01, 500, 'g').nullable().default(null),
	note: textOf(4000),
	pitchUm: figureOf(1, 2000, 'µm'),
	travelUm: figureOf(100, 50_000, 'µm'),
	backlashUm: figureOf(0, 1000, 'µm'),
	smallestStepTurns: figureOf(0.0005, 1, 'turn'),
	isClockwiseLowering: z.boolean().default(true),
	sites: z
		.array(
			z.object({
				id: z.uuid(),
				targetLayer: textOf(60),
				/** Left out: they stay. */
				layerBands: z.array(layerBandSchema).optional()
			})
		)
		.default([]),
	bundles: z.array(z.object({ id: z.uuid(), ...placing })).default([]),
	revision: revisionSchema
});

export type ImplantEdit = z.input<typeof implantEditSchema>;

/** A bundle's role from a day on; the one before ends on that day. */
export const roleChangeSchema = z.object({
	bundleId: z.uuid({ error: 'Choose the bundle.' }),
	role: z.enum(BUNDLE_ROLES, { error: 'Choose a role.' }),
	targetLayer: textOf(60),
	from: daySchema
});

export type RoleChange = z.input<typeof roleChangeSchema>;
