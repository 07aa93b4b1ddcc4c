import { describe, expect, it } from 'vitest';
import { lawsOfLab, outcomeOf, simulatedLab } from '../../../../tests/factories/simulated-matching';
import { seeded } from '../random/seeded';
import { MATCH_RULE } from './match-rule';

describe('following simulated units', () => {
	// Five tetrodes over five days, some eighty steps: three standard errors below what
	// tests/proof/unit-matching.ts finds at length.
	const lab = simulatedLab(seeded(20330220), 5, 5);

	it('finds most cells again by steps that are sure, and nine of ten of those are right', () => {
		const { stepProbabilities, stepIsRight, toBeFound } = outcomeOf(lab, MATCH_RULE);
		const sure = stepIsRight.filter((_, k) => stepProbabilities[k] >= MATCH_RULE.sureProbability);
		const right = sure.filter(Boolean).length;
		expect(toBeFound).toBeGreaterThan(60);
		expect(right / sure.length).toBeGreaterThan(0.9);
		expect(right / toBeFound).toBeGreaterThan(0.72);
	});

	it('is as often right as it says', () => {
		const { right, steps, stepProbabilities } = outcomeOf(lab, MATCH_RULE);
		const stated = stepProbabilities.reduce((sum, p) => sum + p, 0) / steps;
		expect(Math.abs(stated - right / steps)).toBeLessThan(0.1);
	});

	it('does no worse with laws the lab fits to itself without labels', () => {
		const { right, steps, toBeFound } = outcomeOf(lab, {
			...MATCH_RULE,
			laws: lawsOfLab(lab, MATCH_RULE),
			calibration: { slope: 1, intercept: 0 }
		});
		expect(right / steps).toBeGreaterThan(0.9);
		expect(right / toBeFound).toBeGreaterThan(0.8);
	});
});
