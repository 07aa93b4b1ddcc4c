import { settledAtH } from '../settled';
import { verdict, type Rule } from './rule';

/** 4. Tissue settles after a move; nothing is read from it before. */
export const settling: Rule = {
	number: 4,
	name: 'settling',
	apply({ bundle: { moves }, asking: { atH }, parameters }) {
		const settled = settledAtH(moves, atH, parameters);
		const inputs = { settledAtH: Number.isFinite(settled) ? settled : null };
		return {
			inputs,
			verdict: atH < settled ? verdict('settling', 'settling', 'time', settled) : null
		};
	}
};
