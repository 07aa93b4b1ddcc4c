import { describe, expect, it } from 'vitest';
import type { AnalysisState } from '$lib/schemas/enumerations';
import { sessionStanding } from './session-standing';

const analysis = (state: AnalysisState, progress = 1) => ({ analysis: { state, progress } });

describe('standing of a session', () => {
	it.each([
		['nothing uploaded', {}, 'no position, no spikes'],
		['spikes missing', { files: { position: 'taken-in' as const } }, 'no spikes'],
		['a refused file', { files: { position: 'refused' as const } }, 'a file was refused'],
		[
			'both files and no analysis',
			{ files: { position: 'taken-in' as const, spikes: 'taken-in' as const } },
			'not analysed'
		],
		['an analysis at work', { ...analysis('running', 0.42) }, 'running, 42 %'],
		['a failed one', analysis('failed'), 'analysis failed'],
		['a finished one', analysis('done'), 'analysed']
	])('with %s says so', (_, fields, words) => {
		expect(sessionStanding({ files: {}, analysis: null, ...fields }).words).toBe(words);
	});
});
