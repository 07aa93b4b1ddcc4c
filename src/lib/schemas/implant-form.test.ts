import { describe, expect, it } from 'vitest';
import { implantSchema } from './implant';
import { implantFormSchema, readImplantForm, type ImplantForm } from './implant-form';

const PERSON = '01890a5d-ac96-774b-bcce-b302099a8057';

function formOf(fields: Partial<ImplantForm>): ImplantForm {
	return {
		...implantFormSchema.parse({
			surgeryDate: '2026-03-01',
			surgeon: PERSON,
			driveDesign: 'Sixteen',
			massG: null,
			site: ['right dorsal CA1'],
			bundles: ['T01-T02'],
			screws: ['each'],
			kind: ['tetrode'],
			channels: ['4'],
			role: ['record'],
			targetLayer: ['CA1 pyramidal'],
			startDepthUm: ['900'],
			zero: ['dura']
		}),
		...fields
	};
}

describe('form of an implant', () => {
	it('gives each bundle its own screw, in the order listed', () => {
		const { input, issues } = readImplantForm(formOf({}));
		expect(issues).toEqual([]);
		const { sites } = implantSchema.parse(input);
		expect(sites[0].carriages.map((carriage) => carriage.label)).toEqual(['T01', 'T02']);
		expect(sites[0].carriages[1].bundles[0]).toMatchObject({
			label: 'T02',
			channels: 4,
			startDepthUm: 900,
			targetLayer: 'CA1 pyramidal'
		});
	});

	it('puts a block on one screw, and blocks of one site together', () => {
		const { input } = readImplantForm(
			formOf({
				site: ['CA1', 'ca1'],
				bundles: ['S1-S2', 'R1'],
				screws: ['one', 'each'],
				kind: ['shank', 'single-wire'],
				channels: ['32', '1'],
				role: ['record', 'reference'],
				zero: ['pia', 'dura']
			})
		);
		const { sites } = implantSchema.parse(input);
		expect(sites).toHaveLength(1);
		expect(sites[0].carriages.map(({ bundles }) => bundles.length)).toEqual([2, 1]);
	});

	it('takes entry points and layers by their lines, decimal commas too', () => {
		const { input, issues } = readImplantForm(
			formOf({
				entryPoints: 'T01\t-3,8\t2,5\nt02 −3.8 2.8',
				layerBands: 'Right dorsal CA1; pyramidal; 1900; 2050; 100'
			})
		);
		expect(issues).toEqual([]);
		const [site] = implantSchema.parse(input).sites;
		expect(site.carriages.map(({ bundles }) => bundles[0].entryApMm)).toEqual([-3.8, -3.8]);
		expect(site.layerBands).toEqual([
			{ layer: 'pyramidal', fromUm: 1900, toUm: 2050, uncertaintyUm: 100 }
		]);
	});

	it.each([
		['no bundles', { bundles: [''] }, 'bundles'],
		['a range that runs backwards', { bundles: ['T9-T1'] }, 'bundles'],
		['no site', { site: [''] }, 'site'],
		['an entry point of another bundle', { entryPoints: 'T07 1 1' }, 'entryPoints'],
		['an entry point in words', { entryPoints: 'T01 here there' }, 'entryPoints'],
		['a layer of another site', { layerBands: 'MEC; II; 1; 2; 3' }, 'layerBands'],
		['a layer upside down', { layerBands: 'right dorsal CA1; p; 9; 2; 3' }, 'layerBands']
	])('names the field of %s', (_, fields, field) => {
		const { issues } = readImplantForm(formOf(fields));
		expect(issues.map((issue) => issue.field)).toContain(field);
	});

	it('leaves words the lab does not use to the rules of the implant', () => {
		const { input } = readImplantForm(formOf({ kind: ['octrode'], channels: ['four'] }));
		const { error } = implantSchema.safeParse(input);
		expect(new Set(error?.issues.map((issue) => issue.path.at(-1)))).toEqual(
			new Set(['kind', 'channels'])
		);
	});

	it('refuses one label for two bundles', () => {
		const { input } = readImplantForm(
			formOf({
				site: ['CA1', 'CA3'],
				bundles: ['T01', 't01'],
				kind: ['tetrode', 'tetrode'],
				channels: ['4', '4'],
				role: ['record', 'record'],
				zero: ['dura', 'dura']
			})
		);
		expect(implantSchema.safeParse(input).success).toBe(false);
	});
});
