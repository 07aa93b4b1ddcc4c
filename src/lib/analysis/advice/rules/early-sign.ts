import { verdict, type Rule } from './rule';

/** 9. A first sign: the statistic, the quality of its units, or its part in a worse decoding. */
export const earlySign: Rule = {
	number: 9,
	name: 'early sign',
	apply({ evidence }) {
		const { statistic, watchAt, advanceAt, quality, usualQuality, hasLostMostWorth } = evidence;
		const hasHalfQuality =
			quality !== null && usualQuality !== null && quality <= usualQuality / 2 && usualQuality > 0;
		const hasFired = statistic >= watchAt || hasHalfQuality || hasLostMostWorth;
		return {
			inputs: { statistic, watchAt, quality, usualQuality, hasLostMostWorth },
			verdict: hasFired ? verdict('watch', 'early-sign', 'statistic', advanceAt) : null
		};
	}
};
