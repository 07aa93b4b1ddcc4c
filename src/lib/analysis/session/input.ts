import type { Ends } from '../arena/along-straight';
import type { Epoch } from '../position/epochs';
import type { BundleFeatures } from '../tables/features-table';
import type { UnitRow } from '../tables/units-table';
import type { MeanWaveform } from '../tables/waveforms-table';

/** A path as read: one dimension has no y. Times ascend. */
export interface PositionInput {
	readonly tS: Float64Array;
	readonly xCm: Float64Array;
	readonly yCm: Float64Array | null;
	/** Row of the first sample in its file, for messages: 2 below a header. */
	readonly firstRow?: number;
}

/** Spikes of one unit, ascending. */
export interface UnitInput {
	readonly unit: string;
	readonly bundle: string | null;
	readonly timesS: Float64Array;
}

/** What is known of units besides their spikes; each part may be empty. */
export interface UnitEvidence {
	readonly rows: readonly UnitRow[];
	readonly waveforms: readonly MeanWaveform[];
	/** Samples per second of the waveforms; null when not told. */
	readonly waveformHz: number | null;
	readonly features: readonly BundleFeatures[];
}

/** One session: what the animal did and when its units fired, on one clock. */
export interface SessionInput {
	readonly position: PositionInput;
	readonly units: readonly UnitInput[];
	/** Empty: all positions are run time. */
	readonly epochs: readonly Epoch[];
	readonly evidence?: UnitEvidence;
	/** Ends of a straight track, when the arena's are known. */
	readonly ends?: Ends;
}
