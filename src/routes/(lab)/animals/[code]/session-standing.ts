import type { AnalysisState, DataState } from '$lib/schemas/enumerations';

export interface Standing {
	words: string;
	tone: 'plain' | 'good' | 'watch' | 'fault';
}

interface Recorded {
	files: { position?: DataState; spikes?: DataState };
	analysis: { state: AnalysisState; progress: number } | null;
}

/** How far a session has come, in a word or two. */
export function sessionStanding({ files, analysis }: Recorded): Standing {
	if (analysis) {
		switch (analysis.state) {
			case 'done':
				return { words: 'analysed', tone: 'good' };
			case 'failed':
				return { words: 'analysis failed', tone: 'fault' };
			case 'running':
				return { words: `running, ${Math.round(analysis.progress * 100)} %`, tone: 'plain' };
			case 'queued':
				return { words: 'waiting', tone: 'plain' };
		}
	}
	const missing = (['position', 'spikes'] as const).filter((kind) => files[kind] !== 'taken-in');
	if (missing.some((kind) => files[kind] === 'refused')) {
		return { words: 'a file was refused', tone: 'fault' };
	}
	if (missing.length === 0) return { words: 'not analysed', tone: 'watch' };
	return { words: `no ${missing.join(', no ')}`, tone: 'watch' };
}
