import { mean } from '../statistics/mean';
import { studentQuantile } from '../statistics/student-t';
import { regressionToTheMean, spreadOf, type PastAdvance, type Spread } from './gain';

/** What followed the moves that people chose. */
export interface Outcomes {
	readonly n: number;
	/** Change of the tally three recorded days after; null without any. */
	readonly seen: Spread | null;
	/** What stable bundles picked at the same counts would have done by chance. */
	readonly byChance: Spread | null;
}

/**
 * Change after the advances that people chose, beside chance alone at the same counts. People move
 * what has fallen, so the two must be read together, and never as "helped in x %".
 */
export function outcomesOf(advances: readonly PastAdvance[]): Outcomes {
	const chosen = advances.filter(({ chosenBy }) => chosenBy === 'person');
	if (chosen.length === 0) return { n: 0, seen: null, byChance: null };
	return {
		n: chosen.length,
		seen: spreadOf(chosen.map(({ before, after }) => after - before)),
		byChance: regressionToTheMean(chosen)
	};
}

/** An eligible bundle for which a coin decided: moved that day, or three days later. */
export interface CoinTrial {
	readonly isToday: boolean;
	/** Change of the tally three recorded days after the coin fell. */
	readonly change: number;
}

/** What moving did, by coin; only this is an effect. */
export interface CoinEffect {
	readonly today: number;
	readonly later: number;
	/** Mean change moved less mean change not yet moved, units, with its 95 % interval. */
	readonly difference: number;
	readonly low: number;
	readonly high: number;
}

/** Each side needs so many before a difference is shown. */
const LEAST_A_SIDE = 5;

/**
 * Effect of moving today, from the moves that a coin decided: difference of means, interval after
 * Welch (1947). Null below five on either side.
 */
export function coinEffect(trials: readonly CoinTrial[]): CoinEffect | null {
	const today = trials.filter(({ isToday }) => isToday).map(({ change }) => change);
	const later = trials.filter(({ isToday }) => !isToday).map(({ change }) => change);
	if (today.length < LEAST_A_SIDE || later.length < LEAST_A_SIDE) return null;
	const difference = mean(today) - mean(later);
	const parts = [today, later].map((side) => squareError(side));
	const square = parts[0] + parts[1];
	const freedom =
		(square * square) / (parts[0] ** 2 / (today.length - 1) + parts[1] ** 2 / (later.length - 1));
	// Both sides constant: no spread to speak of, and no degrees of freedom either.
	const reach = square > 0 ? studentQuantile(0.025, freedom) * Math.sqrt(square) : 0;
	return {
		today: today.length,
		later: later.length,
		difference,
		low: difference - reach,
		high: difference + reach
	};
}

/** Squared standard error of a mean. */
function squareError(values: readonly number[]): number {
	const middle = mean(values);
	const squares = values.reduce((sum, value) => sum + (value - middle) ** 2, 0);
	return squares / (values.length - 1) / values.length;
}
