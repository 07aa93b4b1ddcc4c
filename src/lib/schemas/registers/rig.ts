import { z } from 'zod';
import { lineOf, revisionSchema, textOf } from '../field-rules';
import type { RegisterDescriptor } from '../register-descriptor';

export const rigSchema = z.object({
	name: lineOf(120),
	place: textOf(120),
	reference: textOf(120),
	ground: textOf(120),
	filters: textOf(120),
	gain: textOf(120),
	headstageSerial: textOf(120),
	note: textOf(4000),
	revision: revisionSchema
});

export const rigs: RegisterDescriptor = {
	singular: 'rig',
	plural: 'rigs',
	title: 'Rigs',
	purpose: 'Where sessions are recorded. What is wired here is offered to each new session.',
	nameField: 'name',
	schema: rigSchema,
	blank: {
		name: '',
		place: '',
		reference: '',
		ground: '',
		filters: '',
		gain: '',
		headstageSerial: '',
		note: '',
		revision: 0
	},
	fields: [
		{ name: 'name', label: 'Name', kind: 'line', section: 'Rig', isRequired: true },
		{ name: 'place', label: 'Place', kind: 'line', section: 'Rig', hint: 'Room, and where in it.' },
		{ name: 'reference', label: 'Reference', kind: 'line', section: 'Wiring' },
		{ name: 'ground', label: 'Ground', kind: 'line', section: 'Wiring' },
		{ name: 'filters', label: 'Filters', kind: 'line', section: 'Wiring' },
		{ name: 'gain', label: 'Gain', kind: 'line', section: 'Wiring' },
		{ name: 'headstageSerial', label: 'Headstage serial', kind: 'code', section: 'Wiring' },
		{ name: 'note', label: 'Note', kind: 'text', section: 'Rig' }
	],
	columns: [
		{ name: 'name', label: 'Name' },
		{ name: 'place', label: 'Place' },
		{ name: 'reference', label: 'Reference' },
		{ name: 'headstageSerial', label: 'Headstage' }
	]
};
