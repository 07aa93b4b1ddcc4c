import { hasLittleLeft } from './little-left';
import { verdict, type Rule } from './rule';

/** 8. The yield has fallen, but what is left still helps: moving would risk it. */
export const stillUseful: Rule = {
	number: 8,
	name: 'losing cells, still useful',
	apply({ evidence, parameters }) {
		const { statistic, advanceAt, units, worth } = evidence;
		const hasFired = statistic >= advanceAt && !hasLittleLeft(evidence, parameters);
		return {
			inputs: { statistic, advanceAt, units, worthHigh: worth?.high ?? null },
			verdict: hasFired
				? verdict('watch', 'losing-cells-still-useful', 'worth', parameters.leastWorthBits)
				: null
		};
	}
};
