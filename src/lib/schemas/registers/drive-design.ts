import { z } from 'zod';
import { DRIVE_THREADS, pitchOfThread } from '../drive-threads';
import { figureOf, lineOf, revisionSchema, textOf } from '../field-rules';
import type { RegisterDescriptor } from '../register-descriptor';

export const driveDesignSchema = z
	.object({
		name: lineOf(120),
		thread: textOf(60),
		pitchUm: z.number().min(0).max(2000, 'At most 2000 µm per turn.').nullable(),
		travelMm: figureOf(0.1, 50, 'mm'),
		smallestStepTurns: figureOf(0.0005, 1, 'turn'),
		backlashUm: figureOf(0, 1000, 'µm').default(0),
		isClockwiseLowering: z.boolean().default(true),
		note: textOf(4000),
		revision: revisionSchema
	})
	.refine(({ thread, pitchUm }) => pitchUm || pitchOfThread(thread), {
		path: ['pitchUm'],
		message: 'Choose a thread of the list or give the pitch in µm per turn.'
	})
	.refine(({ thread, pitchUm }) => agrees(pitchUm, pitchOfThread(thread)), {
		path: ['pitchUm'],
		message: 'This pitch is not that of the chosen thread. Leave one of the two empty.'
	});

/** Measured pitches differ from the nominal one by tenths of a micrometre, threads by tens. */
function agrees(pitchUm: number | null, nominalUm: number | null): boolean {
	return !pitchUm || !nominalUm || Math.abs(pitchUm - nominalUm) < 5;
}

export const driveDesigns: RegisterDescriptor = {
	singular: 'drive design',
	plural: 'drive designs',
	title: 'Drive designs',
	purpose:
		'What one turn of the screw does. The figures are copied to an implant at surgery, so a later edit moves no past depth.',
	nameField: 'name',
	schema: driveDesignSchema,
	blank: {
		name: '',
		thread: '0-80 UNF',
		pitchUm: null,
		travelMm: null,
		smallestStepTurns: 0.125,
		backlashUm: 0,
		isClockwiseLowering: true,
		note: '',
		revision: 0
	},
	fields: [
		{ name: 'name', label: 'Name', kind: 'line', section: 'Design', isRequired: true },
		{
			name: 'thread',
			label: 'Thread',
			kind: 'thread',
			section: 'Screw',
			options: [
				{ value: '', label: 'Another; pitch given below' },
				...DRIVE_THREADS.map(({ name, pitchUm }) => ({
					value: name,
					label: `${name}, ${pitchUm} µm per turn`
				}))
			]
		},
		{
			name: 'pitchUm',
			label: 'Pitch',
			kind: 'figure',
			unit: 'µm per turn',
			section: 'Screw',
			hint: 'Leave empty to take that of the thread.'
		},
		{
			name: 'travelMm',
			label: 'Travel',
			kind: 'figure',
			unit: 'mm',
			section: 'Screw',
			isRequired: true
		},
		{
			name: 'smallestStepTurns',
			label: 'Smallest step',
			kind: 'figure',
			unit: 'turns',
			section: 'Screw',
			isRequired: true,
			hint: 'The least a hand can turn surely: an eighth is 0.125.'
		},
		{
			name: 'backlashUm',
			label: 'Backlash',
			kind: 'figure',
			unit: 'µm',
			section: 'Screw',
			hint: 'Slack taken up when the direction changes; measure it once per design.'
		},
		{
			name: 'isClockwiseLowering',
			label: 'Turning clockwise lowers',
			kind: 'yes-no',
			section: 'Screw'
		},
		{ name: 'note', label: 'Note', kind: 'text', section: 'Design' }
	],
	columns: [
		{ name: 'name', label: 'Name' },
		{ name: 'thread', label: 'Thread' },
		{ name: 'pitchUm', label: 'Pitch, µm', isFigure: true },
		{ name: 'travelMm', label: 'Travel, mm', isFigure: true },
		{ name: 'smallestStepTurns', label: 'Smallest step, turns', isFigure: true },
		{ name: 'backlashUm', label: 'Backlash, µm', isFigure: true }
	]
};
