import { expectedPresence } from './expected-presence';
import { matchScore } from './feature-laws';
import { matchProbability } from './match-probability';
import type { MatchRule } from './match-rule';
import type { BundleDay } from './match-unit';
import { pairFeatures, type PairFeatures } from './pair-features';
import { rivalPriors } from './rival-priors';

/** Ratios beyond this are certain, and a product of two must stay finite. */
const MOST_EXPONENT = 300;

/** A unit: position of its day in the list of days, and its own position on that day. */
export interface UnitAt {
	readonly day: number;
	readonly unit: number;
}

/** Two units of one bundle that may be one cell, with the evidence. */
export interface Candidate {
	readonly from: UnitAt;
	readonly to: UnitAt;
	readonly features: PairFeatures;
	/** Log likelihood ratio, nats. */
	readonly score: number;
	/** Chance that the earlier unit is seen at all, shared among its candidates. */
	readonly prior: number;
	/** The same with the other pairs of the day taken into account, see `rivalPriors`. */
	readonly rivalPrior: number;
	/** From the score and the prior with rivals. */
	readonly probability: number;
}

/**
 * Pairs of earlier units with the units of a later day that lie near enough in depth. Depth is the units'
 * own estimate where both have one, else that of the bundle; not known at all, it keeps nothing apart.
 * @param mayBeOne false for pairs a person has decided
 */
export function candidatesOf(
	days: readonly BundleDay[],
	earlier: readonly UnitAt[],
	toDay: number,
	rule: MatchRule,
	mayBeOne: (row: number, unit: number) => boolean
): Candidate[] {
	const { units, bundleDepthUm } = days[toDay];
	const columns = units.length;
	const ratios = new Float64Array(earlier.length * columns);
	const priors = new Float64Array(ratios.length);
	const presences = Float64Array.from(earlier, ({ day }) =>
		expectedPresence(toDay - day, rule.survivalPerDay, rule.missedPerDay)
	);
	const { slope, intercept } = rule.calibration;
	const found = earlier.flatMap((from, row) => {
		const before = days[from.day];
		const near = units.flatMap((later, unit) => {
			if (!mayBeOne(row, unit)) return [];
			const features = pairFeatures(before.units[from.unit], later);
			const ownUm = features.depthUm;
			const apartUm = Number.isNaN(ownUm) ? bundleDepthUm - before.bundleDepthUm : ownUm;
			return Math.abs(apartUm) > rule.mostDepthUm ? [] : [{ unit, features }];
		});
		return near.map(({ unit, features }) => {
			const at = row * columns + unit;
			const score = matchScore(features, rule.laws);
			ratios[at] = Math.exp(Math.min(MOST_EXPONENT, slope * score + intercept));
			priors[at] = presences[row] / near.length;
			return { from, to: { day: toDay, unit }, features, score, at };
		});
	});
	const withRivals = rivalPriors(ratios, priors, presences);
	return found.map(({ at, ...pair }) => ({
		...pair,
		prior: priors[at],
		rivalPrior: withRivals[at],
		probability: matchProbability(pair.score, withRivals[at], rule.calibration)
	}));
}
