import { analyseSession } from '$lib/analysis/session/analyse';
import { ParameterError, type SessionParameters } from '$lib/analysis/session/parameters';
import type { SessionResult } from '$lib/analysis/session/result';
import { decodeSpikes } from '$lib/analysis/spikes/spike-blob';
import { TableError } from '$lib/analysis/tables/table-error';
import type { UnitRow } from '$lib/analysis/tables/units-table';
import type { AnalysisSetup } from '$lib/schemas/data-state';
import { putParts } from '$lib/server/storage/result-parts';
import { readTrack } from '$lib/server/storage/position-track';
import { decodingPart, mapsPart, pathPart, spikesPart } from './result-arrays';

export interface AnalyseInput {
	track: { sha256: string; samples: number };
	/** Spikes, and what a units table said of each. */
	units: (UnitRow & { spikes: Uint8Array })[];
	setup: AnalysisSetup;
	parameters: SessionParameters;
}

/** Errors lose their class between threads, so a refusal comes back as a value. */
export type AnalyseOutput =
	{ figures: SessionResult; arraysSha256: string } | { refused: { code: string; message: string } };

/** Computes one analysis and keeps its arrays. */
export async function analyseTask(
	{ track, units, setup, parameters }: AnalyseInput,
	tell: (share: number) => void
): Promise<AnalyseOutput> {
	const position = await readTrack(track.sha256, track.samples);
	try {
		const { result, arrays } = analyseSession(
			{
				position,
				units: units.map(({ unit, bundle, spikes }) => ({
					unit,
					bundle,
					timesS: decodeSpikes(spikes)
				})),
				epochs: setup.epochs,
				evidence: { rows: units, waveforms: [], waveformHz: null, features: [] },
				...(setup.ends && { ends: setup.ends })
			},
			parameters,
			tell
		);
		const decoding = arrays.decoding && decodingPart(arrays.decoding);
		const arraysSha256 = await putParts({
			maps: mapsPart(arrays),
			path: pathPart(arrays),
			spikes: spikesPart(arrays),
			...(decoding && { decoding })
		});
		return { figures: result, arraysSha256 };
	} catch (fault) {
		if (fault instanceof TableError)
			return { refused: { code: fault.code, message: fault.message } };
		if (fault instanceof ParameterError) {
			return { refused: { code: 'parameter', message: fault.message } };
		}
		throw fault;
	}
}
