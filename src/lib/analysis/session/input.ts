import type { Ends } from '../arena/along-straight';
import type { Epoch } from '../position/epochs';

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

/** One session: what the animal did and when its units fired, on one clock. */
export interface SessionInput {
	readonly position: PositionInput;
	readonly units: readonly UnitInput[];
	/** Empty: all positions are run time. */
	readonly epochs: readonly Epoch[];
	/** Ends of a straight track, when the arena's are known. */
	readonly ends?: Ends;
}
