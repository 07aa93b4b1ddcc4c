import { normalUpperTail } from '../statistics/normal';
import { studentQuantile } from '../statistics/student-t';

/** One session's decoding error. */
export interface ErrorDay {
	/** Arena, configuration and calibration together: sessions are compared within one task. */
	readonly task: string;
	/** > 0; NaN when the session could not be decoded. */
	readonly medianErrorCm: number;
	/** Standard deviation of ln median error over resampled laps; NaN unknown. */
	readonly lnErrorSd: number;
}

/** Where the chart stands after a session. */
export interface ErrorPoint {
	/** ln median error, ln cm. */
	readonly y: number;
	/** Weighted mean of the deviations, in standard deviations; NaN while the baseline is learnt. */
	readonly z: number;
	/** |z| above it is an alarm; NaN while the baseline is learnt. */
	readonly limit: number;
	/** The error has risen, or fallen, beyond chance. */
	readonly alarm: 'risen' | 'fallen' | null;
}

export interface ErrorChartSettings {
	/** Weight of the newest session. */
	readonly lambda: number;
	/** L of the EWMA chart. */
	readonly width: number;
	/** Sessions of one task that make the baseline, ≥ 3. */
	readonly baseline: number;
}

/** One false alarm in 500 sessions of independent normal data (Lucas and Saccucci 1990). */
export const ERROR_CHART: ErrorChartSettings = { lambda: 0.2, width: 2.962, baseline: 8 };

/**
 * EWMA chart of ln(median decoding error): the baseline is the mean of the first sessions of a task,
 * and the chart starts anew when the task changes. A session's standard deviation is that of its
 * resampled laps, but never less than the baseline sessions' own (n − 1), which also holds what
 * differs from day to day. As the baseline is short, L is widened to the Student quantile of the same
 * tail and by √(1 + 1/n) for the uncertain mean. Limits grow from the first session, as far as a
 * chart of that age may stray.
 * A session that could not be decoded has NaN throughout and changes nothing.
 * @throws RangeError settings out of range, or an error that is not above 0
 */
export function decodingChart(
	sessions: readonly ErrorDay[],
	{ lambda, width, baseline }: ErrorChartSettings = ERROR_CHART
): ErrorPoint[] {
	if (!(lambda > 0 && lambda <= 1 && width > 0)) {
		throw new RangeError(`lambda or width out of range: ${lambda}, ${width}`);
	}
	if (!(baseline >= 3)) throw new RangeError(`a baseline takes at least 3 sessions: ${baseline}`);
	const wide = studentQuantile(normalUpperTail(width), baseline - 1) * Math.sqrt(1 + 1 / baseline);
	let task: string | null = null;
	let learnt: number[] = [];
	let z = 0;
	let age = 0;
	return sessions.map((session): ErrorPoint => {
		if (session.medianErrorCm <= 0) throw new RangeError('a decoding error must be above 0');
		const y = Math.log(session.medianErrorCm);
		if (session.task !== task) [task, learnt, z, age] = [session.task, [], 0, 0];
		const quiet = { y, z: NaN, limit: NaN, alarm: null };
		if (!Number.isFinite(y)) return quiet;
		if (learnt.length < baseline) {
			learnt.push(y);
			return quiet;
		}
		const { mean, sd } = spreadOf(learnt);
		// NaN compares false: a session without resampled laps takes the baseline's spread.
		const spread = session.lnErrorSd > sd ? session.lnErrorSd : sd;
		z = lambda * ((y - mean) / spread) + (1 - lambda) * z;
		age++;
		const limit = wide * Math.sqrt((lambda / (2 - lambda)) * (1 - (1 - lambda) ** (2 * age)));
		const alarm = z > limit ? 'risen' : z < -limit ? 'fallen' : null;
		return { y, z, limit, alarm };
	});
}

function spreadOf(values: readonly number[]): { mean: number; sd: number } {
	const mean = values.reduce((sum, v) => sum + v, 0) / values.length;
	const squares = values.reduce((sum, v) => sum + (v - mean) ** 2, 0);
	return { mean, sd: Math.sqrt(squares / (values.length - 1)) };
}
