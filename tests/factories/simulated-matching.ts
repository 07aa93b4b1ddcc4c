import { followUnits, type Followed } from '../../src/lib/analysis/matching/follow-units';
import type { FeatureLaws } from '../../src/lib/analysis/matching/feature-laws';
import { fitCalibration } from '../../src/lib/analysis/matching/fit-calibration';
import { UNCALIBRATED, type Calibration } from '../../src/lib/analysis/matching/match-probability';
import { refineLaws } from '../../src/lib/analysis/matching/refine-laws';
import type { MatchRule } from '../../src/lib/analysis/matching/match-rule';
import { pairFeatures, type PairFeatures } from '../../src/lib/analysis/matching/pair-features';
import type { Random } from '../../src/lib/analysis/random/seeded';
import { simulatedBundle, type SimulatedDay } from './simulated-bundle';

/** A simulated lab: tetrodes over days, each with its truth. */
export type SimulatedLab = readonly (readonly SimulatedDay[])[];

export function simulatedLab(random: Random, bundles: number, days: number): SimulatedLab {
	return Array.from({ length: bundles }, () => simulatedBundle(days, random));
}

/** Pairs of units of one day on one bundle: never one cell. */
function pairsOfOneDay(lab: SimulatedLab): PairFeatures[] {
	return lab
		.flat()
		.flatMap(({ units }) =>
			units.flatMap((later, k) => units.slice(0, k).map((earlier) => pairFeatures(earlier, later)))
		);
}

/** Laws as the lab itself could fit them, without knowing the truth. */
export function lawsOfLab(lab: SimulatedLab, rule: MatchRule): FeatureLaws {
	const found = lab.flatMap((days) => followUnits(days, rule).candidates);
	const pairs = {
		features: found.map(({ features }) => features),
		priors: Float64Array.from(found, ({ prior }) => prior)
	};
	return refineLaws(pairs, rule.laws, pairsOfOneDay(lab)).laws;
}

/** Every pair that was weighed, with the truth. */
export interface WeighedPairs {
	readonly scores: Float64Array;
	readonly priors: Float64Array;
	readonly probabilities: Float64Array;
	readonly isSame: Uint8Array;
}

/** How well lineages meet the truth. */
export interface MatchingOutcome {
	readonly weighed: WeighedPairs;
	/** Steps made, right ones among them, their probabilities; steps that are there to be found. */
	readonly steps: number;
	readonly right: number;
	readonly stepProbabilities: readonly number[];
	readonly stepIsRight: readonly boolean[];
	readonly toBeFound: number;
}

/** Follows every bundle of a lab and compares with the cells behind the units. */
export function outcomeOf(lab: SimulatedLab, rule: MatchRule): MatchingOutcome {
	const followed = lab.map((days) => followUnits(days, rule));
	const pairs = followed.flatMap(({ candidates }, bundle) =>
		candidates.map((candidate) => ({ ...candidate, days: lab[bundle] }))
	);
	const steps = followed.flatMap((one, bundle) => stepsOf(one, lab[bundle]));
	return {
		weighed: {
			scores: Float64Array.from(pairs, ({ score }) => score),
			priors: Float64Array.from(pairs, ({ rivalPrior }) => rivalPrior),
			probabilities: Float64Array.from(pairs, ({ probability }) => probability),
			isSame: Uint8Array.from(pairs, ({ days, from, to }) =>
				cellAt(days, from) === cellAt(days, to) ? 1 : 0
			)
		},
		steps: steps.length,
		right: steps.filter(({ isRight }) => isRight).length,
		stepProbabilities: steps.map(({ probability }) => probability),
		stepIsRight: steps.map(({ isRight }) => isRight),
		toBeFound: lab.reduce((sum, days) => sum + reappearances(days, rule.reachDays), 0)
	};
}

function cellAt(days: readonly SimulatedDay[], at: { day: number; unit: number }): number {
	return days[at.day].units[at.unit].cell;
}

function stepsOf({ lineages }: Followed, days: readonly SimulatedDay[]) {
	return lineages.flatMap(({ members, probabilities }) =>
		probabilities.map((probability, k) => ({
			probability,
			isRight: cellAt(days, members[k]) === cellAt(days, members[k + 1])
		}))
	);
}

/** Times a cell is cut again within reach of when it was cut last. */
function reappearances(days: readonly SimulatedDay[], reachDays: number): number {
	const last = new Map<number, number>();
	let count = 0;
	days.forEach(({ units }, day) => {
		for (const { cell } of units) {
			if (day - (last.get(cell) ?? -Infinity) <= reachDays) count++;
			last.set(cell, day);
		}
	});
	return count;
}

/** The outcomes of several labs as one. */
export function joinOutcomes(outcomes: readonly MatchingOutcome[]): MatchingOutcome {
	const sum = (of: (one: MatchingOutcome) => number) => outcomes.reduce((n, one) => n + of(one), 0);
	const all = (of: (weighed: WeighedPairs) => Float64Array) =>
		Float64Array.from(outcomes.flatMap(({ weighed }) => [...of(weighed)]));
	return {
		weighed: {
			scores: all(({ scores }) => scores),
			priors: all(({ priors }) => priors),
			probabilities: all(({ probabilities }) => probabilities),
			isSame: Uint8Array.from(outcomes.flatMap(({ weighed }) => [...weighed.isSame]))
		},
		steps: sum(({ steps }) => steps),
		right: sum(({ right }) => right),
		stepProbabilities: outcomes.flatMap(({ stepProbabilities }) => stepProbabilities),
		stepIsRight: outcomes.flatMap(({ stepIsRight }) => stepIsRight),
		toBeFound: sum(({ toBeFound }) => toBeFound)
	};
}

/**
 * Calibration fitted on labs whose truth is known. Priors with rivals depend on the calibration, so it is
 * fitted until it stands still.
 * @param rules the rule of each lab
 */
export function calibrateOn(
	labs: readonly SimulatedLab[],
	rules: readonly MatchRule[]
): Calibration {
	let calibration = UNCALIBRATED;
	for (let round = 0; round < 6; round++) {
		const outcomes = labs.map((lab, k) => outcomeOf(lab, { ...rules[k], calibration }));
		calibration = fitCalibration(joinOutcomes(outcomes).weighed, calibration);
	}
	return calibration;
}
