import { z } from 'zod';
import { expandLabels } from './bundle-labels';
import { daySchema, figureOf, textOf } from './field-rules';
import type { LayerBand } from './layer-band';

const column = z.string().array().default([]);

/**
 * A new implant as its form sends it: bundles in blocks, one row of columns a block, which a plain
 * HTML form can send without a script. Blocks without bundles are left out.
 */
export const implantFormSchema = z.object({
	surgeryDate: daySchema,
	surgeon: z.uuid({ error: 'Choose the surgeon.' }),
	driveDesign: z.string().trim().min(1, 'Choose the drive design.'),
	drive: textOf(60),
	massG: figureOf(0.01, 500, 'g').nullable(),
	note: textOf(4000),
	site: column,
	bundles: column,
	/** "each": a screw for each bundle; "one": one screw moves the block. */
	screws: column,
	kind: column,
	channels: column,
	role: column,
	targetLayer: column,
	startDepthUm: column,
	zero: column,
	tiltDeg: column,
	azimuthDeg: column,
	/** Lines of bundle, AP and ML in mm. */
	entryPoints: textOf(20_000),
	/** Lines of site; layer; from; to; ± in µm. */
	layerBands: textOf(10_000)
});

export type ImplantForm = z.infer<typeof implantFormSchema>;

export interface FormIssue {
	field: string;
	message: string;
}

/** As typed: the schema of the implant has the last word on kinds, roles and bounds. */
interface TypedSite {
	label: string;
	targetLayer: string;
	layerBands: LayerBand[];
	carriages: { label: string; bundles: TypedBundle[] }[];
}

interface TypedBundle {
	label: string;
	kind: string;
	role: string;
	targetLayer: string;
	channels: number;
	entryApMm: number | null;
	entryMlMm: number | null;
	tiltDeg: number;
	azimuthDeg: number;
	startDepthUm: number;
	zero: string;
}

/** The implant a form describes; what cannot be read is named by field. */
export function readImplantForm(form: ImplantForm): {
	input: { sites: TypedSite[] } & Record<string, unknown>;
	issues: FormIssue[];
} {
	const issues: FormIssue[] = [];
	const refuse = (field: string, message: string) => issues.push({ field, message });
	const entries = readEntryPoints(form.entryPoints, refuse);
	const sites = new Map<string, TypedSite>();

	form.bundles.forEach((listed, block) => {
		if (listed.trim() === '') return;
		const labels = labelsOf(listed, (message) =>
			refuse('bundles', `Block ${block + 1}: ${message}`)
		);
		if (labels.length === 0) return;
		const name = form.site[block]?.trim() || '';
		if (name === '') refuse('site', `Block ${block + 1}: name the site, like right dorsal CA1.`);
		const site = sites.get(name.toLowerCase()) ?? {
			label: name,
			targetLayer: '',
			layerBands: [],
			carriages: []
		};
		sites.set(name.toLowerCase(), site);
		site.targetLayer ||= form.targetLayer[block]?.trim() ?? '';
		const bundles = labels.map((label) => bundleOf(form, block, label, entries));
		if (form.screws[block] === 'one') site.carriages.push({ label: listed.trim(), bundles });
		else
			for (const bundle of bundles) site.carriages.push({ label: bundle.label, bundles: [bundle] });
		for (const label of labels) entries.delete(label.toLowerCase());
	});
	for (const { label } of entries.values()) {
		refuse('entryPoints', `No bundle of this implant is called ${label}.`);
	}
	readLayerBands(form.layerBands, sites, refuse);
	if (sites.size === 0 && issues.length === 0) refuse('bundles', 'List the bundles, like T01-T16.');
	const { surgeryDate, surgeon, driveDesign, drive, massG, note } = form;
	const input = {
		surgeryDate,
		surgeon,
		driveDesign,
		drive,
		massG,
		note,
		sites: [...sites.values()]
	};
	return { input, issues };
}

interface EntryPoint {
	label: string;
	apMm: number;
	mlMm: number;
}

function labelsOf(listed: string, refuse: (message: string) => void): string[] {
	try {
		return expandLabels(listed);
	} catch (fault) {
		if (!(fault instanceof RangeError)) throw fault;
		refuse(fault.message);
		return [];
	}
}

function bundleOf(
	form: ImplantForm,
	block: number,
	label: string,
	entries: Map<string, EntryPoint>
): TypedBundle {
	const entry = entries.get(label.toLowerCase());
	return {
		label,
		kind: form.kind[block],
		role: form.role[block],
		targetLayer: form.targetLayer[block] ?? '',
		channels: figure(form.channels[block]),
		entryApMm: entry?.apMm ?? null,
		entryMlMm: entry?.mlMm ?? null,
		tiltDeg: figure(form.tiltDeg[block] || '0'),
		azimuthDeg: figure(form.azimuthDeg[block] || '0'),
		startDepthUm: figure(form.startDepthUm[block] || '0'),
		zero: form.zero[block]
	};
}

/** NaN for what is no number; decimal commas count. */
function figure(text: string | undefined): number {
	return text?.trim() ? Number(text.trim().replace(',', '.').replace('−', '-')) : NaN;
}

function linesOf(text: string): string[] {
	return text
		.split('\n')
		.map((line) => line.trim())
		.filter((line) => line !== '');
}

function readEntryPoints(
	text: string,
	refuse: (field: string, message: string) => void
): Map<string, EntryPoint> {
	const entries = new Map<string, EntryPoint>();
	for (const line of linesOf(text)) {
		const [label, ap, ml, ...rest] = line.split(/[\t; ]+/);
		const [apMm, mlMm] = [figure(ap), figure(ml)];
		if (rest.length > 0 || Number.isNaN(apMm) || Number.isNaN(mlMm)) {
			refuse('entryPoints', `“${line}”: write bundle, AP and ML in mm, like T01 -3.8 2.5.`);
		} else entries.set(label.toLowerCase(), { label, apMm, mlMm });
	}
	return entries;
}

function readLayerBands(
	text: string,
	sites: Map<string, TypedSite>,
	refuse: (field: string, message: string) => void
): void {
	for (const line of linesOf(text)) {
		const [name, layer, ...figures] = line.split(/[\t;]/).map((part) => part.trim());
		const [fromUm, toUm, uncertaintyUm] = figures.map(figure);
		const site = sites.get(name.toLowerCase());
		if (!site) refuse('layerBands', `“${line}”: no block above has a site “${name}”.`);
		else if (!layer || !(toUm > fromUm) || !(uncertaintyUm >= 0)) {
			const example = `${site.label}; pyramidal; 1900; 2050; 100`;
			refuse('layerBands', `“${line}”: write site; layer; from; to; ± in µm, like ${example}.`);
		} else site.layerBands.push({ layer, fromUm, toUm, uncertaintyUm });
	}
}
