import { z } from 'zod';
import { SHARP_WAVES } from './enumerations';
import { lineOf, textOf } from './field-rules';
import { momentSchema } from './moment';

const microvolts = z
	.number({ error: 'Give a number in µV, or leave it empty.' })
	.min(0, 'An amplitude is 0 µV or more.')
	.max(20_000, 'At most 20 000 µV.')
	.nullable()
	.default(null);

const seen = z.boolean().nullable().default(null);

/** What was heard or seen on a bundle; null is "not looked for". */
export const LANDMARK_SIGNS = [
	'sharpWave',
	'ripples',
	'rippleUv',
	'hasTheta',
	'hasHash',
	'hasCells',
	'largestUv'
] as const;

export const landmarkSchema = z
	.object({
		bundle: lineOf(100, 'Say on which bundle.'),
		seenAt: momentSchema.optional(),
		sharpWave: z.enum(SHARP_WAVES).nullable().default(null),
		ripples: z.int().min(0).max(3, 'Ripples go from 0 to 3.').nullable().default(null),
		rippleUv: microvolts,
		hasTheta: seen,
		hasHash: seen,
		hasCells: seen,
		largestUv: microvolts,
		/** Which way is drawn upward, and against what: without them a sign says nothing. */
		signConvention: textOf(120),
		reference: textOf(120),
		note: textOf(1000)
	})
	.refine((row) => row.note !== '' || LANDMARK_SIGNS.some((name) => row[name] !== null), {
		path: ['note'],
		message: 'Say what was heard or seen.'
	})
	.refine((row) => row.sharpWave === null || row.signConvention !== '', {
		path: ['signConvention'],
		message: 'A sharp wave needs its sign convention: is positive drawn upward?'
	});

export const landmarksSchema = z.array(landmarkSchema).min(1, 'No row says anything.').max(500);

export type LandmarkInput = z.input<typeof landmarkSchema>;
