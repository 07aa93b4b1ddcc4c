import { verdict, type Rule } from './rule';

/** 10. Nothing speaks for a move. */
export const stable: Rule = {
	number: 10,
	name: 'stable',
	apply({ evidence: { statistic, watchAt } }) {
		return {
			inputs: { statistic, watchAt },
			verdict: verdict('hold', 'stable', 'statistic', watchAt)
		};
	}
};
