import { z } from 'zod';
import { lineOf, revisionSchema, textOf } from '../field-rules';
import type { RegisterDescriptor } from '../register-descriptor';

export const projectSchema = z.object({
	name: lineOf(120),
	summary: textOf(4000),
	revision: revisionSchema
});

export const projects: RegisterDescriptor = {
	singular: 'project',
	plural: 'projects',
	title: 'Projects',
	purpose: 'What animals are recorded for. An animal may be in several.',
	nameField: 'name',
	schema: projectSchema,
	blank: { name: '', summary: '', revision: 0 },
	fields: [
		{ name: 'name', label: 'Name', kind: 'line', section: 'Project', isRequired: true },
		{
			name: 'summary',
			label: 'Summary',
			kind: 'text',
			section: 'Project',
			hint: 'The question, and what would answer it.'
		}
	],
	columns: [
		{ name: 'name', label: 'Name' },
		{ name: 'summary', label: 'Summary' },
		{ name: 'animalsNow', label: 'Animals now', isFigure: true }
	]
};
