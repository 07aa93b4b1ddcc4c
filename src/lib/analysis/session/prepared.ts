import type { Arena } from '../arena/arena';
import type { Bins } from '../arena/bins';
import type { Metric } from '../arena/metric';
import type { Smoother } from '../maps/smoother';
import type { Laps } from '../position/laps';

/** A path put into an arena, with everything that maps and decoding read of it. One value per sample. */
export interface Path {
	readonly tS: Float64Array;
	readonly xCm: Float64Array;
	/** NaN in one dimension. */
	readonly yCm: Float64Array;
	/** Stretch of run time, −1 for none. */
	readonly stretch: Int32Array;
	/** Standing time, s, 0 outside every stretch. */
	readonly standS: Float64Array;
	readonly speedCmS: Float64Array;
	/** Bin of the arena, −1 where there is no place. */
	readonly bin: Int32Array;
	/** 1 where the sample counts for maps and decoding. */
	readonly isUsed: Uint8Array;
	readonly medianIntervalS: number;
	readonly usedS: number;
	readonly laps: Laps | null;
	/** Laps, or blocks of time where there are too few laps: what is drawn for intervals. */
	readonly groups: {
		readonly count: number;
		readonly ofSample: Int32Array;
		/** Number of each group among those in its own direction, null for blocks of time. */
		readonly round: Int32Array | null;
	};
}

/** The arena of a session, cut into bins, with its distances and its smoothing. */
export interface Ground {
	readonly arena: Arena;
	readonly bins: Bins;
	readonly metric: Metric;
	readonly smooth: Smoother;
	readonly minOccupancyS: number;
}

/** One unit of a session. */
export interface UnitSpikes {
	readonly unit: string;
	readonly bundle: string | null;
	/** All spikes, ascending, s. */
	readonly timesS: Float64Array;
	/** Position sample of each spike, −1 for none. */
	readonly samples: Int32Array;
	/** Spikes at samples that count. */
	readonly used: number;
}
