import { z } from 'zod';
import { readArena } from '../arena-reading';
import { figureOf, lineOf, revisionSchema, textOf } from '../field-rules';
import type { RegisterDescriptor } from '../register-descriptor';

const coordinate = figureOf(-100_000, 100_000).nullable();

export const arenaSchema = z
	.object({
		name: lineOf(120),
		description: lineOf(2000, 'Describe the shape, like straight:300.'),
		binCm: figureOf(0.5, 50, 'cm'),
		pxPerCm: figureOf(0.01, 10_000, 'px per cm').nullable(),
		endAX: coordinate,
		endAY: coordinate,
		endBX: coordinate,
		endBY: coordinate,
		note: textOf(4000),
		revision: revisionSchema
	})
	.superRefine((arena, context) => {
		const reading = readArena(arena.description, arena.binCm);
		if (!reading.isReadable) {
			context.addIssue({ code: 'custom', path: ['description'], message: reading.words });
		}
		const ends = [arena.endAX, arena.endAY, arena.endBX, arena.endBY];
		const given = ends.filter((end) => end !== null).length;
		if (given === 0) return;
		const refuse = (message: string) =>
			context.addIssue({ code: 'custom', path: ['endAX'], message });
		if (given < 4) refuse('Give all four figures of the two ends, or none.');
		else if (!arena.description.trim().startsWith('straight:')) {
			refuse('Only a straight track has two ends. Leave these empty.');
		} else if (arena.endAX === arena.endBX && arena.endAY === arena.endBY) {
			refuse('The two ends are the same point.');
		}
	});

export const arenas: RegisterDescriptor = {
	singular: 'arena',
	plural: 'arenas',
	title: 'Arenas',
	purpose: 'Where animals run. Days are compared only within one arena.',
	nameField: 'name',
	schema: arenaSchema,
	blank: {
		name: '',
		description: '',
		binCm: 5,
		pxPerCm: null,
		endAX: null,
		endAY: null,
		endBX: null,
		endBY: null,
		note: '',
		revision: 0
	},
	fields: [
		{ name: 'name', label: 'Name', kind: 'line', section: 'Arena', isRequired: true },
		{
			name: 'description',
			label: 'Shape and size',
			kind: 'arena',
			section: 'Arena',
			isRequired: true,
			hint: 'In cm: straight:300, ring:250 (around), rectangle:100x80, disc:75 (across), polyline:0,0;120,0;120,80 (corners), tree:0,0>60,0;60,0>60,80 (pieces that share points).'
		},
		{
			name: 'binCm',
			label: 'Bin',
			kind: 'figure',
			unit: 'cm',
			section: 'Arena',
			isRequired: true,
			hint: 'Width of one bin of a map.'
		},
		{
			name: 'pxPerCm',
			label: 'Pixels per cm',
			kind: 'figure',
			section: 'Camera',
			hint: 'Needed only for positions in pixels.'
		},
		{
			name: 'endAX',
			label: 'End A, x',
			kind: 'figure',
			section: 'Ends of a straight track',
			hint: 'As the camera sees it; distance runs from A to B. Without ends, days cannot be compared.'
		},
		{ name: 'endAY', label: 'End A, y', kind: 'figure', section: 'Ends of a straight track' },
		{ name: 'endBX', label: 'End B, x', kind: 'figure', section: 'Ends of a straight track' },
		{ name: 'endBY', label: 'End B, y', kind: 'figure', section: 'Ends of a straight track' },
		{ name: 'note', label: 'Note', kind: 'text', section: 'Arena' }
	],
	columns: [
		{ name: 'name', label: 'Name' },
		{ name: 'reading', label: 'Shape and size' },
		{ name: 'description', label: 'As written' },
		{ name: 'pxPerCm', label: 'Pixels per cm', isFigure: true }
	]
};
