import { verdict, type Rule } from './rule';

/** 5. Few days say nothing: better silence than a guess. */
export const tooFewDays: Rule = {
	number: 5,
	name: 'too few days',
	apply({ evidence: { tallies, talliesLately }, parameters: { leastTallies, latelyTallies } }) {
		const missing = Math.max(leastTallies - tallies, latelyTallies - talliesLately);
		return {
			inputs: { tallies, talliesLately },
			verdict: missing > 0 ? verdict('too-few-days', 'too-few-days', 'tallies', missing) : null
		};
	}
};
