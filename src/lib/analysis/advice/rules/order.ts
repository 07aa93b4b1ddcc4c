import { commonCauseRule } from './common-cause';
import { earlySign } from './early-sign';
import { hardware } from './hardware';
import { lowering } from './lowering';
import { parked } from './parked';
import type { Rule } from './rule';
import { settling } from './settling';
import { stable } from './stable';
import { stillUseful } from './still-useful';
import { tooFewDays } from './too-few-days';
import { yieldLost } from './yield-lost';

/** The first that fires decides. */
export const RULES: readonly Rule[] = [
	parked,
	hardware,
	lowering,
	settling,
	tooFewDays,
	commonCauseRule,
	yieldLost,
	stillUseful,
	earlySign,
	stable
];
