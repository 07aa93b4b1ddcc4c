import { verdict, type Rule } from './rule';

/** 6. Many bundles that fall on one day share a cause: headstage, reference, reader, the animal. */
export const commonCauseRule: Rule = {
	number: 6,
	name: 'common cause',
	apply({ evidence: { commonShare, isCommonCause } }) {
		return {
			inputs: { canTell: commonShare !== null, commonShare },
			verdict: isCommonCause ? verdict('hold', 'common-cause', 'other-bundles') : null
		};
	}
};
