import { describe, expect, it } from 'vitest';
import { seeded } from '../random/seeded';
import { learnYield, PRIOR, yieldOf, type Baseline } from './bundle-baseline';
import { labPrior } from './lab-prior';
import { simulatedBundle, simulateDay } from './simulated-bundle';
import type { YieldModel } from './yield-model';

const random = seeded(31);

function taught(model: YieldModel, days: number): Baseline {
	const bundle = simulatedBundle(model, random);
	let baseline = PRIOR;
	for (let day = 0; day < days; day++) {
		simulateDay(bundle, model, 0, random);
		const { previous, units: today, kept } = bundle;
		baseline = learnYield(baseline, { previous, today, kept, gapDays: 1 });
	}
	return baseline;
}

describe('labPrior', () => {
	it('has the means of the lab, and weighs little when its bundles differ', () => {
		const prior = labPrior(
			Array.from({ length: 80 }, () => {
				const survival = 0.6 + 0.3 * random.next();
				return taught({ survival, arrivals: 0.5 + 2 * random.next() }, 40);
			})
		);
		expect(yieldOf(prior).survival).toBeGreaterThan(0.72);
		expect(yieldOf(prior).survival).toBeLessThan(0.82);
		expect(Math.abs(yieldOf(prior).arrivals - 1.5)).toBeLessThan(0.25);
		// Beta with variance .0075 about .75 weighs 24 units; Gamma with .33 about 1.5, 4.5 days.
		expect(prior.kept + prior.lost).toBeGreaterThan(12);
		expect(prior.kept + prior.lost).toBeLessThan(40);
		expect(prior.days).toBeGreaterThan(2.5);
		expect(prior.days).toBeLessThanOrEqual(8);
	});

	it('weighs most, and no more than 60 units and 8 days, when they are alike', () => {
		const one = taught({ survival: 0.8, arrivals: 1.2 }, 30);
		const prior = labPrior(Array.from({ length: 12 }, () => one));
		expect(prior.kept + prior.lost).toBeCloseTo(60, 10);
		expect(prior.days).toBe(8);
	});

	it('stays with the first prior below ten bundles, and teaches no level', () => {
		const nine = Array.from({ length: 9 }, () => taught({ survival: 0.5, arrivals: 3 }, 20));
		expect(labPrior(nine)).toBe(PRIOR);
		expect(labPrior([...nine, nine[0]]).levelPrecision).toBe(0);
		expect(yieldOf(labPrior([...nine, nine[0]])).survival).toBeLessThan(0.6);
	});
});
