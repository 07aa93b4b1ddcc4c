import { createReadStream, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { SessionInput } from '../../src/lib/analysis/session/input';
import {
	readEpochs,
	readPosition,
	readSpikes
} from '../../src/lib/analysis/tables/read-session-tables';

/** Path of a file of an open recording under tests/fixtures. */
export function recordingFile(recording: string, file: string): string {
	return fileURLToPath(new URL(`../fixtures/${recording}/${file}`, import.meta.url));
}

/** An open recording as the analysis takes it. */
export async function recording(name: string, positionFile: string): Promise<SessionInput> {
	const open = (file: string) => createReadStream(recordingFile(name, file));
	return {
		position: await readPosition(open(positionFile)),
		units: (await readSpikes(open('spikes.csv'))).units,
		epochs: await readEpochs(open('epochs.csv'))
	};
}

/** Figures of an open recording made by an independent program. */
export interface RecordingReference {
	readonly run_dwell_s: number;
	readonly used_dwell_s: number;
	readonly valid_bins: number;
	readonly units: Readonly<
		Record<
			string,
			{
				readonly n_spikes: number;
				readonly used_spikes: number;
				readonly used_mean_rate_hz: number;
				readonly si_smooth: number | null;
				readonly sparsity_smooth: number | null;
				readonly peak_smooth_hz: number;
				readonly peak_at_cm: readonly number[];
				readonly half_corr: number | null;
			}
		>
	>;
	readonly decoding: readonly {
		readonly tau_s: number;
		readonly units: number;
		readonly windows: number;
		readonly median_error_cm: number;
		readonly mean_error_cm: number;
		readonly median_error_cm_dwell_prior: number;
		readonly chance_median_error_cm: number;
	}[];
}

/** Reads the figures of an open recording. */
export function recordingReference(name: string, file = 'reference.json'): RecordingReference {
	return JSON.parse(readFileSync(recordingFile(name, file), 'utf8')) as RecordingReference;
}
