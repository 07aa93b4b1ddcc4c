import betainc from '@stdlib/math-base-special-betainc';
import { normalQuantile } from './normal';

/**
 * P(T > t) of Student's distribution.
 * @param freedom degrees of freedom, > 0
 * @throws RangeError freedom not above 0
 */
export function studentUpperTail(t: number, freedom: number): number {
	if (!(freedom > 0)) throw new RangeError(`degrees of freedom must be above 0: ${freedom}`);
	const half = 0.5 * betainc(freedom / (freedom + t * t), freedom / 2, 0.5);
	return t >= 0 ? half : 1 - half;
}

/**
 * The t above which a share of Student's distribution lies, by halving an interval that starts at
 * the normal one (Student's tail is the heavier).
 * @param upperTail in (0, 0.5]
 * @throws RangeError upperTail out of range, freedom not above 0
 */
export function studentQuantile(upperTail: number, freedom: number): number {
	if (!(upperTail > 0 && upperTail <= 0.5)) {
		throw new RangeError(`upper tail ${upperTail} is outside 0 to 0.5`);
	}
	if (upperTail === 0.5) return 0;
	let low = normalQuantile(1 - upperTail);
	let high = Math.max(2 * low, 1);
	while (studentUpperTail(high, freedom) > upperTail) high *= 2;
	while (high - low > 1e-14 * high) {
		const middle = (low + high) / 2;
		if (middle <= low || middle >= high) break;
		if (studentUpperTail(middle, freedom) > upperTail) low = middle;
		else high = middle;
	}
	return (low + high) / 2;
}
