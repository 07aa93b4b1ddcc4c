import { z } from 'zod';
import { figureOf, lineOf, revisionSchema, textOf } from '../field-rules';
import type { RegisterDescriptor } from '../register-descriptor';

export const driveSchema = z.object({
	designId: z.uuid({ error: 'Choose the design.' }),
	serial: lineOf(60),
	measuredPitchUm: figureOf(1, 2000, 'µm').nullable(),
	massG: figureOf(0.01, 500, 'g').nullable(),
	note: textOf(4000),
	revision: revisionSchema
});

export const drives: RegisterDescriptor = {
	singular: 'drive',
	plural: 'drives',
	title: 'Drives',
	purpose: 'The drives on the shelf and in animals, each under its serial.',
	nameField: 'serial',
	schema: driveSchema,
	blank: {
		designId: '',
		serial: '',
		measuredPitchUm: null,
		massG: null,
		note: '',
		revision: 0
	},
	fields: [
		{ name: 'serial', label: 'Serial', kind: 'code', section: 'Drive', isRequired: true },
		{
			name: 'designId',
			label: 'Design',
			kind: 'register',
			from: 'drive-designs',
			section: 'Drive',
			isRequired: true
		},
		{
			name: 'measuredPitchUm',
			label: 'Measured pitch',
			kind: 'figure',
			unit: 'µm per turn',
			section: 'Measured',
			hint: 'Taken instead of the design’s when this drive is implanted.'
		},
		{
			name: 'massG',
			label: 'Mass',
			kind: 'figure',
			unit: 'g',
			section: 'Measured',
			hint: 'Offered as the implant’s mass, which is taken off every weight.'
		},
		{ name: 'note', label: 'Note', kind: 'text', section: 'Drive' }
	],
	columns: [
		{ name: 'serial', label: 'Serial' },
		{ name: 'designName', label: 'Design' },
		{ name: 'measuredPitchUm', label: 'Measured pitch, µm', isFigure: true },
		{ name: 'massG', label: 'Mass, g', isFigure: true },
		{ name: 'usedIn', label: 'In' }
	]
};
