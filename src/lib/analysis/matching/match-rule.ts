import { STARTING_LAWS, type FeatureLaws } from './feature-laws';
import type { Calibration } from './match-probability';

/** How units are followed from day to day; stored with every lineage made by it. */
export interface MatchRule {
	readonly name: string;
	readonly laws: FeatureLaws;
	readonly calibration: Calibration;
	/** A pair must have at least this calibrated score: 0 favours finding every match, 2 true ones. */
	readonly threshold: number;
	/** Pairs less probable than this, rivals counted, are not joined. */
	readonly leastProbability: number;
	/**
	 * Steps at least this probable stand without a person. Those between are proposals to look at: refusing
	 * them here would break a lineage in two, and then both parts would seek the same cell.
	 */
	readonly sureProbability: number;
	/** Share of units of a recorded day that are expected on the next. */
	readonly survivalPerDay: number;
	/** Share of units that are there on a recorded day but are not cut, or not joined. */
	readonly missedPerDay: number;
	/** Recorded days looked back, so that a unit missed on a day can still be found. */
	readonly reachDays: number;
	/** Pairs further apart in depth are no candidates, µm. */
	readonly mostDepthUm: number;
}

/**
 * Fitted to simulated tetrodes with the starting laws (`npm run proof -- unit-matching`). No pairs of a
 * real recording stand behind it: a lab that has decided some fifty fits its own.
 */
export const SIMULATED_CALIBRATION: Calibration = {
	slope: 0.9,
	intercept: -1.6,
	temper: 0.9
};

/** Where a lab begins. */
export const MATCH_RULE: MatchRule = {
	name: 'session@1',
	laws: STARTING_LAWS,
	calibration: SIMULATED_CALIBRATION,
	threshold: 0,
	leastProbability: 0.5,
	sureProbability: 0.8,
	survivalPerDay: 0.8,
	missedPerDay: 0.1,
	reachDays: 3,
	mostDepthUm: 150
};

/** @throws RangeError a number of the rule makes no sense */
export function demandMatchRule(rule: MatchRule): void {
	if (!(rule.survivalPerDay > 0 && rule.survivalPerDay < 1)) {
		throw new RangeError(`survival ${rule.survivalPerDay} must lie between 0 and 1`);
	}
	if (!(rule.missedPerDay >= 0 && rule.missedPerDay < 1)) {
		throw new RangeError(`share missed ${rule.missedPerDay} must be in 0 to under 1`);
	}
	if (!(Number.isInteger(rule.reachDays) && rule.reachDays >= 1)) {
		throw new RangeError(`reach must be a whole number of days, got ${rule.reachDays}`);
	}
	if (!(rule.leastProbability >= 0 && rule.leastProbability <= rule.sureProbability)) {
		throw new RangeError('the least probability must lie between 0 and the sure one');
	}
	if (!Number.isFinite(rule.threshold)) throw new RangeError('threshold must be a number');
}
