import type { PositionInputs, SessionResult, SpikeInputs } from './result';

/** What only the caller knows: the files, the program and the clock. */
export interface Provenance {
	readonly positionSha256: string;
	readonly spikesSha256: string;
	readonly codeVersion: string;
	/** ISO 8601, UTC. */
	readonly startedAt: string;
	readonly elapsedS: number;
}

/** `quarterturn/session-analysis@1` in full, as it is stored, sent and printed. */
export interface CompleteResult extends Omit<SessionResult, 'inputs'> {
	readonly inputs: {
		readonly position: { readonly sha256: string } & PositionInputs;
		readonly spikes: { readonly sha256: string } & SpikeInputs;
	};
	readonly codeVersion: string;
	readonly startedAt: string;
	readonly elapsedS: number;
}

/** Adds to a result where it came from. */
export function completeResult(result: SessionResult, from: Provenance): CompleteResult {
	return {
		...result,
		inputs: {
			position: { sha256: from.positionSha256, ...result.inputs.position },
			spikes: { sha256: from.spikesSha256, ...result.inputs.spikes }
		},
		codeVersion: from.codeVersion,
		startedAt: from.startedAt,
		elapsedS: from.elapsedS
	};
}
