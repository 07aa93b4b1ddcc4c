import { z } from 'zod';

const figure = z.number().nullable();
const figures = z.array(figure).readonly();
const place = z.tuple([z.number(), figure]);
const interval = z.tuple([z.number(), z.number()]).nullable();

const parametersSchema = z.object({
	arena: z.string(),
	binCm: z.number(),
	smoothCm: z.number(),
	minSpeedCmS: z.number(),
	minOccupancyS: z.number(),
	windowMs: z.number(),
	folds: z.int(),
	prior: z.enum(['even', 'time-spent']),
	shuffles: z.int(),
	seed: z.int(),
	defaults: z.literal('session@1')
});

const map = {
	spikesUsed: z.int(),
	meanRateHz: figure,
	peakRateHz: figure,
	peakCm: place.nullable(),
	informationBitsPerSpike: figure,
	informationBitsPerS: figure,
	sparsity: figure,
	fields: z
		.array(
			z.object({
				peakRateHz: z.number(),
				peakCm: place,
				centreCm: place,
				sizeCm: figure,
				areaCm2: figure
			})
		)
		.readonly(),
	ratesHzByBin: figures
};

const qualitySchema = z
	.object({
		level: z.enum(['good', 'fair', 'poor', 'not-known']),
		thresholds: z.string(),
		refractoryViolations: z.int(),
		violationShare: figure,
		contamination: figure,
		contaminationLimit95: figure,
		presenceRatio: figure,
		peakToPeakUv: figure,
		signalToNoise: figure,
		troughToPeakMs: figure,
		isolationDistance: figure,
		lRatio: figure,
		featuresUsed: z.int(),
		deadFeatures: z.array(z.int()).readonly(),
		type: z.enum(['principal', 'interneuron', 'unclear']).nullable()
	})
	.optional()
	.meta({ description: 'Absent from results of an analysis before 1.1.0.' });

const unitSchema = z.object({
	unit: z.string(),
	bundle: z.string().nullable(),
	spikes: z.int(),
	informationP: figure,
	coherence: figure,
	splitHalfR: figure,
	oddEvenR: figure,
	...map,
	quality: qualitySchema,
	directions: z.object({ up: z.object(map), down: z.object(map) }).nullable()
});

const decodingSchema = z.object({
	unitsUsed: z.int(),
	windows: z.int(),
	medianErrorCm: figure,
	medianErrorCi95Cm: interval,
	meanErrorCm: figure,
	p95ErrorCm: figure,
	fractionWithin10Cm: figure,
	chanceMedianErrorCm: figure,
	coverage95: figure,
	floorMedianErrorCm: figure,
	memory: z.object({ medianErrorCm: figure }),
	worthByBundle: z
		.array(
			z.object({
				bundle: z.string(),
				units: z.int(),
				medianErrorWithoutCm: figure,
				bits: figure,
				bitsCi90: interval
			})
		)
		.readonly(),
	unitDropCurve: z
		.array(
			z.object({ units: z.int(), medianErrorCm: z.number(), p10: z.number(), p90: z.number() })
		)
		.readonly()
});

/** `quarterturn/session-analysis@1`, as the command line prints it too. */
export const analysisResultSchema = z
	.object({
		schema: z.literal('quarterturn/session-analysis@1'),
		parameters: parametersSchema,
		inputs: z.object({
			position: z.object({
				sha256: z.string(),
				samples: z.int(),
				durationS: z.number(),
				medianIntervalS: z.number(),
				gapsS: z.number()
			}),
			spikes: z.object({
				sha256: z.string(),
				spikes: z.int(),
				units: z.int(),
				outsidePosition: z.int()
			})
		}),
		occupancy: z.object({
			binsX: z.int(),
			binsY: z.int(),
			edgesXCm: z.array(z.number()).readonly(),
			edgesYCm: z.array(z.number()).readonly().nullable(),
			secondsByBin: figures
		}),
		units: z.array(unitSchema).readonly(),
		decoding: decodingSchema,
		warnings: z.array(z.string()).readonly(),
		codeVersion: z.string(),
		startedAt: z.string(),
		elapsedS: z.number()
	})
	.meta({
		id: 'SessionAnalysis',
		description:
			'Lengths in cm, rates in Hz; bins are row-major with y rows, null where the animal never was. A figure that cannot be computed is null and `warnings` says why.'
	});

export { parametersSchema as analysisParametersAnswerSchema };
