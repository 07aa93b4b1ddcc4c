import { z } from 'zod';
import { analysisParametersSchema } from '../analysis-parameters';
import { ANALYSIS_STATES } from '../enumerations';
import { analysisParametersAnswerSchema, analysisResultSchema } from './analysis-result';
import { idParams, momentAnswerSchema } from './fields';
import { operation } from './operation';

export const requestAnalysis = operation({
	id: 'requestAnalysis',
	method: 'POST',
	path: '/api/v1/sessions/{id}/analyses',
	tag: 'Analyses',
	summary: 'Ask for an analysis of a session',
	description:
		'What is left out follows `session@1` and the arena. A worker computes it; read the analysis until it is done.',
	permission: 'sessions.write',
	params: idParams,
	body: analysisParametersSchema.extend({
		sorting: z.uuid().optional().meta({ description: 'The newest in force when left out.' })
	}),
	isBodyOptional: true,
	status: 202,
	answer: z.object({ id: z.uuid(), state: z.enum(ANALYSIS_STATES) }).meta({ id: 'AskedAnalysis' }),
	answerHeaders: { Location: 'Address of the analysis' }
});

export const getAnalysis = operation({
	id: 'getAnalysis',
	method: 'GET',
	path: '/api/v1/analyses/{id}',
	tag: 'Analyses',
	summary: 'How far an analysis is, and its result once done',
	permission: 'data.read',
	params: idParams,
	status: 200,
	answer: z
		.object({
			id: z.uuid(),
			session: z.uuid(),
			sorting: z.uuid(),
			state: z.enum(ANALYSIS_STATES),
			progress: z.number().min(0).max(1),
			askedAt: momentAnswerSchema,
			finishedAt: momentAnswerSchema.nullable(),
			isCurrent: z.boolean().meta({ description: 'The one in force for its session.' }),
			parameters: analysisParametersAnswerSchema,
			failure: z
				.object({ code: z.string(), message: z.string(), canRetry: z.boolean() })
				.nullable(),
			result: analysisResultSchema.nullable()
		})
		.meta({ id: 'Analysis' })
});
