import type { DayComparison } from './compare-days';
import { fisherMean } from '../statistics/fisher-mean';
import { mean } from '../statistics/mean';

/** All pairs of days that lie equally far apart. */
export interface LagSummary {
	readonly lagDays: number;
	/** Pairs of days. */
	readonly dayPairs: number;
	/** Units over all pairs of days; a unit counts once for each. */
	readonly units: number;
	/** Over all units of all pairs, by Fisher's transform. */
	readonly meanMapR: number;
	/** Mean over pairs of days; pairs with too few units are left out. */
	readonly meanPopulationR: number;
}

/** Stability against distance in lab days, shortest lag first; pairs of days without units count nowhere. */
export function byLag(comparisons: readonly DayComparison[]): LagSummary[] {
	const withUnits = comparisons.filter(({ units }) => units > 0);
	const lags = [...new Set(withUnits.map(({ lagDays }) => lagDays))].sort((a, b) => a - b);
	return lags.map((lagDays) => {
		const pairs = withUnits.filter((one) => one.lagDays === lagDays);
		const vectors = pairs.map(({ populationVectors }) => populationVectors.mean);
		return {
			lagDays,
			dayPairs: pairs.length,
			units: pairs.reduce((sum, { units }) => sum + units, 0),
			meanMapR: fisherMean(pairs.flatMap(({ mapR }) => [...mapR])),
			meanPopulationR: mean(vectors.filter((value) => !Number.isNaN(value)))
		};
	});
}
