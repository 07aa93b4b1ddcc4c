/**
 * Exact two-sided P(|S| ≥ |s|) of Kendall's S when every order of the values is as likely.
 * The number of falling pairs over the orders of a multiset is spread as the Gaussian multinomial
 * coefficient [n]!/Π [t]! (MacMahon 1916); S = pairs that differ − 2 · falling pairs.
 * @param s     observed
 * @param sizes of the groups of equal values, adding up to n
 * @returns 1 when all values are equal
 * Cost: O(n³); exact while n! is below 2⁵³ (n ≤ 18).
 */
export function exactKendallP(s: number, sizes: readonly number[]): number {
	const n = sizes.reduce((sum, t) => sum + t, 0);
	let ways = factorialInQ(n);
	for (const t of sizes) ways = quotient(ways, factorialInQ(t));
	const differing = ways.length - 1;
	let total = 0;
	let asFar = 0;
	ways.forEach((count, falling) => {
		total += count;
		if (Math.abs(differing - 2 * falling) >= Math.abs(s)) asFar += count;
	});
	return asFar / total;
}

/** Coefficients of [n]! = Π (1 + q + … + q^{k−1}), k = 1 … n. */
function factorialInQ(n: number): number[] {
	let product = [1];
	for (let k = 2; k <= n; k++) {
		const next = new Array<number>(product.length + k - 1).fill(0);
		product.forEach((value, i) => {
			for (let j = 0; j < k; j++) next[i + j] += value;
		});
		product = next;
	}
	return product;
}

/** Exact division of polynomials whose lowest coefficient is 1. */
function quotient(top: readonly number[], bottom: readonly number[]): number[] {
	const rest = [...top];
	return Array.from({ length: top.length - bottom.length + 1 }, (_, i) => {
		const value = rest[i];
		bottom.forEach((b, j) => (rest[i + j] -= value * b));
		return value;
	});
}
