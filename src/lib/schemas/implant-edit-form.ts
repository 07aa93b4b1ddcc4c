import { z } from 'zod';
import { implantEditSchema } from './implant';

const column = z.string().array().default([]);

/** Corrections of an implant as the form sends them: one list a column, one entry a bundle or site. */
export const implantEditFormSchema = implantEditSchema.omit({ sites: true, bundles: true }).extend({
	siteId: column,
	siteLayer: column,
	bundleId: column,
	startDepthUm: column,
	zero: column,
	zeroUncertaintyUm: column,
	tiltDeg: column,
	azimuthDeg: column,
	entryApMm: column,
	entryMlMm: column
});

export type ImplantEditForm = z.infer<typeof implantEditFormSchema>;

/** Lists of the form that describe bundles, in the order the table shows them. */
export const PLACING_COLUMNS = [
	'startDepthUm',
	'zero',
	'zeroUncertaintyUm',
	'entryApMm',
	'entryMlMm',
	'tiltDeg',
	'azimuthDeg'
] as const;

/** The form as the service takes it. Empty cells are null; what is no number is refused there. */
export function toImplantEdit(form: ImplantEditForm) {
	const { siteId, siteLayer, bundleId, ...rest } = form;
	return {
		...rest,
		sites: siteId.map((id, at) => ({ id, targetLayer: siteLayer[at] ?? '' })),
		bundles: bundleId.map((id, at) => ({
			id,
			...Object.fromEntries(
				PLACING_COLUMNS.map((name) => [
					name,
					name === 'zero' ? form.zero[at] : figure(form[name][at])
				])
			)
		}))
	};
}

function figure(text: string | undefined): number | null {
	const typed = text?.trim() ?? '';
	return typed === '' ? null : Number(typed.replace(',', '.').replace('−', '-'));
}
