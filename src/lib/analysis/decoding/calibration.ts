import { credibleSetSize, massBefore, reachesPlace } from './credible-set';

/** Whether posteriors are as sure as they may be. */
export interface Calibration {
	readonly levels: readonly number[];
	/** Share of windows whose true bin lies in the highest-posterior set of each level. */
	readonly coverage: Float64Array;
	/** Bins in that set, on average. */
	readonly meanSetBins: Float64Array;
	/** Mean of |coverage − level| over the levels. */
	readonly meanGap: number;
	readonly windows: number;
	/** Windows whose true bin has posterior 0: they lie in no set and count as not covered. */
	readonly unscorable: number;
}

/** Levels at which coverage is drawn. */
export const CALIBRATION_LEVELS: readonly number[] = [0.5, 0.8, 0.9, 0.95];

/**
 * Coverage of the highest-posterior sets. With bins, honest posteriors cover a little more than the
 * level; covering less means too sure: correlations left out, or maps that no longer hold.
 * @param posteriors row-major [window][bin], rows sum to one (single precision will do)
 * @param trueBin    bin of each row, −1 for none (not covered)
 * @param levels     in (0, 1)
 * @returns every figure NaN without windows
 * @throws RangeError lengths do not fit, or a level outside (0, 1)
 * Cost: O(windows · bins · log bins).
 */
export function calibration(
	posteriors: Float32Array | Float64Array,
	trueBin: Int32Array,
	levels: readonly number[] = CALIBRATION_LEVELS
): Calibration {
	const windows = trueBin.length;
	const bins = windows > 0 ? posteriors.length / windows : 0;
	if (!Number.isInteger(bins) || (windows === 0 && posteriors.length > 0)) {
		throw new RangeError(`${posteriors.length} probabilities for ${windows} windows`);
	}
	const outside = levels.find((level) => !(level > 0 && level < 1));
	if (outside !== undefined) throw new RangeError(`level ${outside} is not between 0 and 1`);
	const covered = new Float64Array(levels.length);
	const size = new Float64Array(levels.length);
	const row = new Float64Array(bins);
	let unscorable = 0;
	for (let w = 0; w < windows; w++) {
		row.set(posteriors.subarray(w * bins, (w + 1) * bins));
		const isScorable = trueBin[w] >= 0 && row[trueBin[w]] > 0;
		if (!isScorable) unscorable++;
		const before = isScorable ? massBefore(row, trueBin[w]) : Infinity;
		row.sort();
		levels.forEach((level, l) => {
			if (reachesPlace(before, level)) covered[l]++;
			size[l] += credibleSetSize(row, level);
		});
	}
	const coverage = covered.map((count) => count / windows);
	return {
		levels,
		coverage,
		meanSetBins: size.map((sum) => sum / windows),
		meanGap: coverage.reduce((sum, is, l) => sum + Math.abs(is - levels[l]), 0) / levels.length,
		windows,
		unscorable
	};
}
