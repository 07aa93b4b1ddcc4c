import type { CreationAttributes } from 'sequelize';
import { SESSION_DEFAULTS } from '$lib/analysis/session/parameters';
import { Analysis } from '$lib/server/models/analysis';
import { makeDataFile } from './data-file';
import { makeSession } from './session';
import { makeSorting } from './sorting';

/** A queued analysis of a session with its own positions and sorting. */
export async function makeAnalysis(
	fields: Partial<CreationAttributes<Analysis>> = {}
): Promise<Analysis> {
	const sessionId = fields.sessionId ?? (await makeSession()).id;
	const file = await makeDataFile({ sessionId, state: 'taken-in', rowCount: 3 });
	return Analysis.create({
		sessionId,
		sortingId: fields.sortingId ?? (await makeSorting({ sessionId })).id,
		positionFileId: fields.positionFileId ?? file.id,
		parameters: { ...SESSION_DEFAULTS, arena: 'straight:300' },
		positionSha256: file.sha256,
		spikesSha256: file.sha256,
		analysisVersion: 'session@1',
		codeVersion: 'test',
		...fields
	});
}
