import { poissonAtLeast, poissonLogPmf } from '../statistics/poisson';
import { runLength } from './run-length-equation';

/**
 * Reference value of a Poisson CUSUM for a fall: k = (μ₀ − μ₁)/ln(μ₀/μ₁) (Lucas 1985).
 * @throws RangeError unless 0 < fallen < usual
 */
export function poissonCusumReference(usual: number, fallen: number): number {
	if (!(fallen > 0 && fallen < usual)) {
		throw new RangeError(`means must be 0 < fallen < usual: ${fallen}, ${usual}`);
	}
	return (usual - fallen) / Math.log(usual / fallen);
}

/**
 * Poisson CUSUM for a fall: S = max(0, S + k − x) after each count, an alarm at S ≥ h. For
 * independent counts only; units that stay for days make daily yields anything but.
 * A NaN count leaves S where it is.
 */
export function poissonCusum(counts: ArrayLike<number>, k: number): Float64Array {
	const sums = new Float64Array(counts.length);
	let s = 0;
	for (let i = 0; i < counts.length; i++) {
		if (Number.isFinite(counts[i])) s = Math.max(0, s + k - counts[i]);
		sums[i] = s;
	}
	return sums;
}

/**
 * Exact mean number of counts until S ≥ h, from S = 0: the Markov chain of Brook and Evans (1972).
 * @param mean  of independent Poisson counts, > 0
 * @param parts k and h must be whole multiples of 1/parts; the chain has h · parts states
 * @throws RangeError mean, k or h not above 0, or no such multiples
 * Cost: O((h · parts)³).
 */
export function poissonCusumRunLength(mean: number, k: number, h: number, parts = 4): number {
	if (!(mean > 0 && k > 0 && h > 0)) {
		throw new RangeError(`mean, k and h must be above 0: ${mean}, ${k}, ${h}`);
	}
	const kParts = wholeParts(k, parts);
	const states = Float64Array.from({ length: wholeParts(h, parts) }, (_, i) => i);
	return runLength(states, (from, j) => {
		// S falls to state j exactly when the count is (from + k − j)·parts; to 0 at any larger one.
		const count = (from + kParts - j) / parts;
		if (j === 0) return poissonAtLeast(count, mean);
		return Number.isInteger(count) && count >= 0 ? Math.exp(poissonLogPmf(count, mean)) : 0;
	});
}

function wholeParts(value: number, parts: number): number {
	const whole = Math.round(value * parts);
	if (Math.abs(whole - value * parts) > 1e-9) {
		throw new RangeError(`${value} is not a whole multiple of 1/${parts}`);
	}
	return whole;
}
