import { describe, expect, it } from 'vitest';
import { implantEditSchema } from './implant';
import { implantEditFormSchema, toImplantEdit } from './implant-edit-form';

const ID = '01890a5d-ac96-774b-bcce-b302099a8057';

const form = (fields = {}) =>
	implantEditFormSchema.parse({
		surgeryDate: '2026-03-01',
		surgeon: ID,
		massG: null,
		pitchUm: 317.5,
		travelUm: 5000,
		backlashUm: 40,
		smallestStepTurns: 0.125,
		siteId: [ID],
		siteLayer: ['CA1'],
		bundleId: [ID],
		startDepthUm: ['900,5'],
		zero: ['pia'],
		zeroUncertaintyUm: [''],
		entryApMm: ['−3.8'],
		entryMlMm: ['2.5'],
		tiltDeg: ['10'],
		azimuthDeg: ['90'],
		...fields
	});

describe('corrections of an implant', () => {
	it('put each column beside its bundle, decimal commas and minus signs as people write them', () => {
		const { bundles, sites } = implantEditSchema.parse(toImplantEdit(form()));
		expect(bundles).toEqual([
			{
				id: ID,
				startDepthUm: 900.5,
				zero: 'pia',
				zeroUncertaintyUm: null,
				entryApMm: -3.8,
				entryMlMm: 2.5,
				tiltDeg: 10,
				azimuthDeg: 90
			}
		]);
		expect(sites).toEqual([{ id: ID, targetLayer: 'CA1' }]);
	});

	it('are refused when a cell is no number', () => {
		const read = implantEditSchema.safeParse(toImplantEdit(form({ tiltDeg: ['steep'] })));
		expect(read.error?.issues[0].path).toEqual(['bundles', 0, 'tiltDeg']);
	});

	it('keep the layers of a site that the form does not show', () => {
		const { sites } = implantEditSchema.parse(toImplantEdit(form()));
		expect(sites[0]).not.toHaveProperty('layerBands');
	});
});
