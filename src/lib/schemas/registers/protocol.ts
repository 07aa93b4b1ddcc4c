import { z } from 'zod';
import { RESTRICTIONS, type Restriction } from '../enumerations';
import { countOf, daySchema, figureOf, lineOf, revisionSchema, textOf } from '../field-rules';
import type { RegisterDescriptor } from '../register-descriptor';

export const RESTRICTION_WORDS: Record<Restriction, string> = {
	none: 'None',
	food: 'Food',
	water: 'Water',
	'food-and-water': 'Food and water'
};

export const protocolSchema = z.object({
	number: lineOf(60),
	title: lineOf(200),
	animalsAllowed: countOf(1, 100_000),
	surgeriesAllowed: countOf(0, 100),
	restriction: z.enum(RESTRICTIONS, { error: 'Choose what is restricted.' }),
	weightFloorPercent: figureOf(50, 100, '%'),
	longestImplantDays: countOf(1, 3650).nullable(),
	endPoints: textOf(10_000),
	expiresOn: daySchema,
	people: z.array(z.uuid()).default([]),
	revision: revisionSchema
});

export const protocols: RegisterDescriptor = {
	singular: 'protocol',
	plural: 'protocols',
	title: 'Protocols',
	purpose:
		'Approvals as granted to the lab. Copy the limits from the approved text; it decides, with the veterinarian and local rules.',
	nameField: 'number',
	schema: protocolSchema,
	blank: {
		number: '',
		title: '',
		animalsAllowed: null,
		surgeriesAllowed: null,
		restriction: 'none',
		weightFloorPercent: null,
		longestImplantDays: null,
		endPoints: '',
		expiresOn: '',
		people: [],
		revision: 0
	},
	fields: [
		{ name: 'number', label: 'Number', kind: 'code', section: 'Approval', isRequired: true },
		{ name: 'title', label: 'Title', kind: 'line', section: 'Approval', isRequired: true },
		{
			name: 'expiresOn',
			label: 'Valid until',
			kind: 'day',
			section: 'Approval',
			isRequired: true,
			hint: 'The last day on which work is allowed.'
		},
		{
			name: 'animalsAllowed',
			label: 'Animals allowed',
			kind: 'figure',
			section: 'Limits',
			isRequired: true,
			hint: 'Every animal that was ever on the protocol counts.'
		},
		{
			name: 'surgeriesAllowed',
			label: 'Surgeries allowed per animal',
			kind: 'figure',
			section: 'Limits',
			isRequired: true
		},
		{
			name: 'longestImplantDays',
			label: 'Longest implant',
			kind: 'figure',
			unit: 'days',
			section: 'Limits',
			hint: 'Leave empty when the approval sets none.'
		},
		{
			name: 'restriction',
			label: 'Restriction',
			kind: 'choice',
			section: 'Welfare',
			options: RESTRICTIONS.map((value) => ({ value, label: RESTRICTION_WORDS[value] })),
			hint: 'Animals under a restriction are listed for weighing every day.'
		},
		{
			name: 'weightFloorPercent',
			label: 'Weight floor',
			kind: 'figure',
			unit: '% of baseline',
			section: 'Welfare',
			isRequired: true,
			hint: 'As the approved text says.'
		},
		{ name: 'endPoints', label: 'Humane end points', kind: 'text', section: 'Welfare' },
		{
			name: 'people',
			label: 'Named people',
			kind: 'people',
			section: 'People',
			hint: 'Only a person named here can be the surgeon of an implant.'
		}
	],
	columns: [
		{ name: 'number', label: 'Number' },
		{ name: 'title', label: 'Title' },
		{ name: 'animalsLeft', label: 'Animals left', isFigure: true },
		{ name: 'restriction', label: 'Restriction', words: RESTRICTION_WORDS },
		{ name: 'weightFloorPercent', label: 'Floor', isFigure: true, unit: '%' },
		{ name: 'expiresOn', label: 'Valid until', isFigure: true }
	]
};
