import { z } from 'zod';
import { implantSchema } from '../implant';
import { animalParams } from './fields';
import { operation } from './operation';

export const createImplant = operation({
	id: 'createImplant',
	method: 'POST',
	path: '/api/v1/animals/{code}/implants',
	tag: 'Implants',
	summary: 'Enter an implant with its sites, carriages and bundles',
	description:
		'`driveDesign` names a design of the lab; a PI’s token may give a new one in full. Pitch, travel and backlash are copied from the design, or from the drive where it was measured.',
	permission: 'implants.write',
	params: animalParams,
	body: implantSchema,
	status: 201,
	answer: z
		.object({
			animal: z.string(),
			letter: z.string().meta({ description: 'A for the first implant.' }),
			surgeryDate: z.iso.date(),
			driveDesign: z.string(),
			pitchUm: z.number().meta({ description: 'Per turn.' }),
			travelUm: z.number(),
			backlashUm: z.number(),
			sites: z.array(
				z.object({
					label: z.string(),
					carriages: z.array(
						z.object({
							id: z.uuid(),
							label: z.string(),
							screwOrder: z.int(),
							bundles: z.array(z.object({ id: z.uuid(), label: z.string(), code: z.string() }))
						})
					)
				})
			)
		})
		.meta({ id: 'Implant' }),
	refusals: { 409: 'The protocol does not cover the surgery, or the drive is in use; see `code`' }
});
