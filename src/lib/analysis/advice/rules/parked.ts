import { verdict, type Rule } from './rule';

/** 1. A person took the bundle out. */
export const parked: Rule = {
	number: 1,
	name: 'parked',
	apply({ bundle: { isParked } }) {
		return {
			inputs: { isParked },
			verdict: isParked ? verdict('parked', 'parked', 'person') : null
		};
	}
};
