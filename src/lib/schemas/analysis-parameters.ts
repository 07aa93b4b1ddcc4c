import { z } from 'zod';
import { SESSION_DEFAULTS } from '$lib/analysis/session/parameters';

const whole = (least: number, most: number) =>
	z
		.number({ error: 'Give a whole number.' })
		.int('Give a whole number.')
		.min(least, `At least ${least}.`)
		.max(most, `At most ${most}.`);

const length = (least: number, most: number, unit: string) =>
	z
		.number({ error: 'Give a number.' })
		.min(least, `At least ${least} ${unit}.`)
		.max(most, `At most ${most} ${unit}.`);

/** The choices of `session@1`, with the bounds that the computation itself keeps. */
const choices = {
	binCm: length(0.1, 100, 'cm').meta({ description: 'Width of a bin, cm' }),
	smoothCm: length(0, 100, 'cm').meta({ description: 'σ of the smoothing, cm; 0 for none' }),
	minSpeedCmS: length(0, 500, 'cm/s').meta({ description: 'Slower samples are not used, cm/s' }),
	minOccupancyS: length(0.001, 60, 's').meta({
		description: 'Bins visited for less time stay undefined, s'
	}),
	windowMs: length(10, 10_000, 'ms').meta({ description: 'Length of a decoding window, ms' }),
	folds: whole(2, 1000).meta({ description: 'Contiguous blocks of cross-validation' }),
	prior: z.enum(['even', 'time-spent']).meta({ description: 'What is believed before any spike' }),
	shuffles: whole(0, 100_000).meta({ description: 'Circular shifts behind each p' }),
	seed: whole(0, 2_147_483_647).meta({ description: 'Start of the random numbers' })
};

/** As a program sends them: all may be left out. */
export const analysisParametersSchema = z
	.strictObject({
		...choices,
		arena: z.string().meta({
			description: 'Name of one of the session’s arenas, where it has several'
		})
	})
	.partial();

export type AnalysisChoices = z.infer<typeof analysisParametersSchema>;

/** As the page's form sends them: every figure is there to be seen. */
export const analysisFormSchema = z.object({
	binCm: choices.binCm.default(SESSION_DEFAULTS.binCm),
	smoothCm: choices.smoothCm.default(SESSION_DEFAULTS.smoothCm),
	minSpeedCmS: choices.minSpeedCmS.default(SESSION_DEFAULTS.minSpeedCmS),
	minOccupancyS: choices.minOccupancyS.default(SESSION_DEFAULTS.minOccupancyS),
	windowMs: choices.windowMs.default(SESSION_DEFAULTS.windowMs),
	folds: choices.folds.default(SESSION_DEFAULTS.folds),
	prior: choices.prior.default(SESSION_DEFAULTS.prior),
	shuffles: choices.shuffles.default(SESSION_DEFAULTS.shuffles),
	seed: choices.seed.default(SESSION_DEFAULTS.seed),
	sortingId: z.uuid().optional(),
	arena: z.string().default('')
});
