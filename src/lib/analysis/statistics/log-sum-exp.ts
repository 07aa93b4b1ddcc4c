/**
 * ln Σ exp(v) without overflow or underflow: the largest value is taken out first.
 * @returns −∞ when every value is −∞, or there are none
 */
export function logSumExp(values: ArrayLike<number>): number {
	let top = -Infinity;
	for (let i = 0; i < values.length; i++) if (values[i] > top) top = values[i];
	if (top === -Infinity) return -Infinity;
	let sum = 0;
	for (let i = 0; i < values.length; i++) sum += Math.exp(values[i] - top);
	return top + Math.log(sum);
}
