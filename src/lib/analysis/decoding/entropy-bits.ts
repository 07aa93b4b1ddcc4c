/**
 * How unsure a posterior is: −Σ p log₂ p, bits; 0 for one certain place, log₂ n for n even ones.
 * @param probabilities sum 1
 */
export function entropyBits(probabilities: ArrayLike<number>): number {
	let bits = 0;
	for (let p = 0; p < probabilities.length; p++) {
		if (probabilities[p] > 0) bits -= probabilities[p] * Math.log2(probabilities[p]);
	}
	return bits;
}
