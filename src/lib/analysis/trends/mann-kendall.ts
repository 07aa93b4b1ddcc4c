import { normalUpperTail } from '../statistics/normal';
import { exactKendallP } from './exact-kendall';
import { tieSizes, tieTerm } from './tie-term';

/** Whether a series rises or falls. */
export interface MannKendall {
	/** Pairs that rise less pairs that fall. */
	readonly s: number;
	readonly varS: number;
	/** Continuity-corrected normal score, 0 when s is 0. */
	readonly z: number;
	/** Two-sided; exact below eight days, else from z. */
	readonly p: number;
	/** Kendall's τ_b; NaN when all values are equal. */
	readonly tauB: number;
	/** Days used. */
	readonly n: number;
}

/** Below this many days the normal score is too rough. */
const EXACT_BELOW = 8;

/**
 * Trend test of Mann (1945) and Kendall: S = Σ sign(later − earlier), variance corrected for ties.
 * Days of one animal are not independent, so the test is over-eager on daily yields: use it as a
 * description, or hand in the inflation of Hamed and Rao.
 * @param y         in order of time; NaN values are left out
 * @param inflation of the variance, ≥ 1; the exact p below eight days does not know it, so there p
 *                  is NaN when it is above 1
 * @returns p 1 and z 0 when all values are equal; p NaN with fewer than two values
 * @throws RangeError inflation below 1
 * Cost: O(n²).
 */
export function mannKendall(y: ArrayLike<number>, inflation = 1): MannKendall {
	if (!(inflation >= 1)) throw new RangeError(`inflation must be at least 1: ${inflation}`);
	const v = Float64Array.from(Array.from(y).filter(Number.isFinite));
	const n = v.length;
	let s = 0;
	for (let i = 0; i < n; i++) for (let j = i + 1; j < n; j++) s += Math.sign(v[j] - v[i]);
	const pairs = (n * (n - 1)) / 2;
	const tied = tieSizes(v).reduce((sum, t) => sum + (t * (t - 1)) / 2, 0);
	const varS = (inflation * (n * (n - 1) * (2 * n + 5) - tieTerm(v))) / 18;
	const z = s === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(varS);
	const tauB = s / Math.sqrt(pairs * (pairs - tied));
	return { s, varS, z, p: pOf(v, s, z, inflation), tauB, n };
}

function pOf(v: Float64Array, s: number, z: number, inflation: number): number {
	if (v.length < 2) return NaN;
	if (v.length >= EXACT_BELOW) return 2 * normalUpperTail(Math.abs(z));
	return inflation > 1 ? NaN : exactKendallP(s, tieSizes(v));
}
