import { describe, expect, it } from 'vitest';
import { DEMO_ANIMALS } from './animals';
import { planDay } from './day-plan';

const [stable, drifting, fresh] = DEMO_ANIMALS;
const daysOf = ({ surgeryDaysAgo }: typeof stable) =>
	Array.from({ length: surgeryDaysAgo + 4 }, (_, daysAgo) => daysAgo);

describe('the plan of a demo day', () => {
	it('is the same each time', () => {
		expect(planDay(drifting, 1)).toEqual(planDay(drifting, 1));
	});

	it('never brings an animal near the floor of its protocol', () => {
		for (const animal of DEMO_ANIMALS) {
			for (const daysAgo of daysOf(animal)) {
				const share = planDay(animal, daysAgo).weight.netG / animal.baselineWeightG;
				expect(share).toBeGreaterThan(0.88);
			}
		}
	});

	it('turns no screw before surgery, and leaves the reference above the layer', () => {
		expect(planDay(stable, stable.surgeryDaysAgo).turns).toEqual([]);
		const turned = (bundle: string) =>
			daysOf(stable)
				.flatMap((daysAgo) => planDay(stable, daysAgo).turns)
				.reduce((sum, turn) => sum + (turn.bundle === bundle ? turn.turns : 0), 0);
		expect(turned('T01')).toBe(3.25);
		expect(turned('T16')).toBe(1);
	});

	it('records sessions on the last days only, and none of an animal still being lowered', () => {
		const recorded = (animal: typeof stable) =>
			daysOf(animal).filter((daysAgo) => planDay(animal, daysAgo).sessions.length > 0).length;
		expect(recorded(stable)).toBe(8);
		expect(recorded(drifting)).toBe(6);
		expect(recorded(fresh)).toBe(0);
	});

	it('tells of a bundle that falls silent, and of a move to find cells again', () => {
		const counts = [5, 4, 3, 2, 1, 0].map(
			(daysAgo) =>
				planDay(drifting, daysAgo).tallies.find(({ bundle }) => bundle === 'T05')?.principal
		);
		expect(counts[0]).toBeGreaterThan(1);
		expect(counts.slice(4)).toEqual([0, 0]);
		expect(planDay(drifting, 2).turns.map(({ bundle }) => bundle)).toEqual(['T05']);
	});
});
