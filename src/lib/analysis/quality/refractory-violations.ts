/** How often a unit fires sooner after itself than a nerve cell can. */
export interface RefractoryViolations {
	/** Spike pairs closer than the refractory period, neighbours or not. */
	readonly pairs: number;
	/** Inter-spike intervals shorter than it. */
	readonly shortIntervals: number;
	/** Share of all inter-spike intervals; NaN with fewer than two spikes. */
	readonly shareOfIntervals: number;
}

/** A nerve cell rests this long after a spike, s (labs take 0.0015 to 0.003). */
export const REFRACTORY_S = 0.002;

/**
 * Spikes of one unit that lie closer together than the refractory period. All pairs are counted, as
 * the contamination formulas want; while violations are rare this equals counting short intervals.
 * @param timesS      spike times, s, ascending
 * @param refractoryS strictly closer than this is a violation
 * @throws RangeError refractoryS not above 0, or times that go back
 * Source: Hill, Mehta and Kleinfeld 2011. Cost: O(spikes + pairs).
 */
export function refractoryViolations(
	timesS: Float64Array,
	refractoryS = REFRACTORY_S
): RefractoryViolations {
	if (!(refractoryS > 0)) throw new RangeError(`refractory period must be above 0 s`);
	let pairs = 0;
	let shortIntervals = 0;
	let oldest = 0;
	for (let i = 1; i < timesS.length; i++) {
		const intervalS = timesS[i] - timesS[i - 1];
		if (!(intervalS >= 0)) throw new RangeError(`spike ${i} is earlier than the one before it`);
		while (timesS[i] - timesS[oldest] >= refractoryS) oldest++;
		pairs += i - oldest;
		if (intervalS < refractoryS) shortIntervals++;
	}
	const intervals = timesS.length - 1;
	return {
		pairs,
		shortIntervals,
		shareOfIntervals: intervals > 0 ? shortIntervals / intervals : NaN
	};
}
