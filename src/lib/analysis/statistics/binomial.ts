import betainc from '@stdlib/math-base-special-betainc';
import gammaln from '@stdlib/math-base-special-gammaln';

/**
 * ln P(X = k) of a binomial count; −∞ where k cannot occur.
 * @param trials whole, ≥ 0
 * @param chance of one trial, in [0, 1]
 * @throws RangeError trials or chance out of range
 */
export function binomialLogPmf(k: number, trials: number, chance: number): number {
	demand(trials, chance);
	if (Number.isNaN(k)) return NaN;
	if (!Number.isInteger(k) || k < 0 || k > trials) return -Infinity;
	// 0 · ln 0 counts as 0 at the ends of the range.
	const won = k === 0 ? 0 : k * Math.log(chance);
	const lost = k === trials ? 0 : (trials - k) * Math.log1p(-chance);
	return gammaln(trials + 1) - gammaln(k + 1) - gammaln(trials - k + 1) + won + lost;
}

/** P(X ≤ k) of a binomial count; k need not be whole. */
export function binomialAtMost(k: number, trials: number, chance: number): number {
	demand(trials, chance);
	const whole = Math.floor(k);
	if (whole < 0) return 0;
	if (whole >= trials) return 1;
	return betainc(1 - chance, trials - whole, whole + 1);
}

/** P(X ≥ k) of a binomial count, without the loss of 1 − P(X ≤ k − 1) in the tail. */
export function binomialAtLeast(k: number, trials: number, chance: number): number {
	demand(trials, chance);
	const whole = Math.ceil(k);
	if (whole <= 0) return 1;
	if (whole > trials) return 0;
	return betainc(chance, whole, trials - whole + 1);
}

function demand(trials: number, chance: number): void {
	if (!(Number.isInteger(trials) && trials >= 0)) {
		throw new RangeError(`trials must be a whole number, ≥ 0: ${trials}`);
	}
	if (!(chance >= 0 && chance <= 1)) throw new RangeError(`chance ${chance} is outside 0 to 1`);
}
