import type { Calibration } from '../../src/lib/analysis/matching/match-probability';
import { MATCH_RULE, type MatchRule } from '../../src/lib/analysis/matching/match-rule';
import { seeded } from '../../src/lib/analysis/random/seeded';
import type { Report } from '../../src/commands/proof/report';
import { reliability } from '../factories/reliability';
import {
	calibrateOn,
	joinOutcomes,
	lawsOfLab,
	outcomeOf,
	simulatedLab,
	type MatchingOutcome,
	type SimulatedLab
} from '../factories/simulated-matching';

export const about =
	'Matching of units across days on simulated tetrodes: precision, recall, calibration';

const SEED = 20330219;
const LABS_TO_LEARN = 60;
// So many that the fullest doubt holds over a thousand pairs in each tenth of probability.
const LABS_TO_TEST = 180;
const BUNDLES = 8;
const DAYS = 8;
const LEAST_PRECISION = 0.95;
const LEAST_RECALL = 0.8;
const MOST_OFF = 0.05;

export default async function unitMatching(report: Report): Promise<void> {
	report.line(
		'Everything here is simulated: cells at random sites around a tetrode, drift, noise, bursts, lost, new and missed cells. It shows that the method does what it says under known truth, not how well it does on a brain.'
	);
	// One generator for all labs, so that no two of them share a draw.
	const random = seeded(SEED);
	const labs = (count: number) =>
		Array.from({ length: count }, () => simulatedLab(random, BUNDLES, DAYS));
	const learn = labs(LABS_TO_LEARN);
	const test = labs(LABS_TO_TEST);
	const faults: string[] = [];
	const show = (title: string, ruleOf: (lab: SimulatedLab) => MatchRule, mostOff: number) => {
		const outcome = joinOutcomes(test.map((lab) => outcomeOf(lab, ruleOf(lab))));
		faults.push(...shortfalls(report, title, outcome, mostOff));
	};

	report.line(
		`${LABS_TO_LEARN} labs to fit slope and intercept, ${LABS_TO_TEST} others to test, ${BUNDLES} tetrodes over ${DAYS} days each, seed ${SEED}.`
	);
	const fitted = calibrateOn(
		learn,
		learn.map(() => MATCH_RULE)
	);
	report.line(`Starting laws, fitted: ${told(fitted)}; built in: ${told(MATCH_RULE.calibration)}`);
	show(
		'Starting laws, fitted calibration',
		() => ({ ...MATCH_RULE, calibration: fitted }),
		MOST_OFF
	);
	show('Starting laws, built-in calibration', () => MATCH_RULE, MOST_OFF);

	const own = (lab: SimulatedLab): MatchRule => ({
		...MATCH_RULE,
		laws: lawsOfLab(lab, MATCH_RULE)
	});
	const refined = calibrateOn(learn, learn.map(own));
	report.line(`Laws refined by each lab without labels, fitted: ${told(refined)}`);
	show('Refined laws', (lab) => ({ ...own(lab), calibration: refined }), MOST_OFF);
	if (faults.length > 0) throw new Error(faults.join('\n'));
}

function told({ slope, intercept, temper = 1 }: Calibration): string {
	return `slope ${slope.toFixed(3)}, intercept ${intercept.toFixed(3)}, temper ${temper.toFixed(3)}`;
}

function shortfalls(
	report: Report,
	title: string,
	outcome: MatchingOutcome,
	mostOff: number
): string[] {
	const { weighed, steps, right, toBeFound, stepProbabilities, stepIsRight } = outcome;
	const sure = stepProbabilities.map((p) => p >= MATCH_RULE.sureProbability);
	const sureRight = stepIsRight.filter((is, k) => is && sure[k]).length;
	const precision = sureRight / sure.filter(Boolean).length;
	const recall = sureRight / toBeFound;
	const stated = stepProbabilities.reduce((sum, p) => sum + p, 0) / steps;
	report.line(
		`${title}: sure steps (${MATCH_RULE.sureProbability} or more) precision ${precision.toFixed(3)}, recall ${recall.toFixed(3)} of ${toBeFound}; all steps precision ${(right / steps).toFixed(3)} (stated ${stated.toFixed(3)}), recall ${(right / toBeFound).toFixed(3)}`
	);
	const bins = reliability(weighed.probabilities, weighed.isSame);
	for (const { from, count, meanProbability, share } of bins) {
		report.line(
			`${title}, stated ${from.toFixed(1)} to ${(from + 0.1).toFixed(1)}: ${count} pairs, stated ${meanProbability.toFixed(3)}, true ${share.toFixed(3)}`
		);
	}
	const off = Math.max(...bins.map((bin) => Math.abs(bin.meanProbability - bin.share)));
	report.line(`${title}: stated and true differ by ${off.toFixed(3)} at most`);
	return [
		...(precision >= LEAST_PRECISION ? [] : [`${title}: precision ${precision.toFixed(3)}`]),
		...(recall >= LEAST_RECALL ? [] : [`${title}: recall ${recall.toFixed(3)}`]),
		...(off <= mostOff ? [] : [`${title}: off by ${off.toFixed(3)}`])
	];
}
