import type { PositionInputs, SessionResult, SpikeInputs } from './result';

/** How a result came about: what was read, by which code, when. */
export interface Provenance {
	/** SHA-256 of the files as they were given. */
	readonly positionSha256: string;
	readonly spikesSha256: string;
	readonly codeVersion: string;
	/** ISO 8601, UTC. */
	readonly startedAt: string;
	readonly elapsedS: number;
}

/** `quarterturn/session-analysis@1` whole, as it is stored, printed and answered. */
export interface AnalysisResult extends Omit<SessionResult, 'inputs'> {
	readonly inputs: {
		readonly position: { readonly sha256: string } & PositionInputs;
		readonly spikes: { readonly sha256: string } & SpikeInputs;
	};
	readonly codeVersion: string;
	readonly startedAt: string;
	readonly elapsedS: number;
}

/** Joins figures and provenance. */
export function analysisResult(figures: SessionResult, from: Provenance): AnalysisResult {
	const { schema, parameters, inputs, occupancy, units, decoding, warnings } = figures;
	return {
		schema,
		parameters,
		inputs: {
			position: { sha256: from.positionSha256, ...inputs.position },
			spikes: { sha256: from.spikesSha256, ...inputs.spikes }
		},
		occupancy,
		units,
		decoding,
		warnings,
		codeVersion: from.codeVersion,
		startedAt: from.startedAt,
		elapsedS: from.elapsedS
	};
}
