/**
 * Index of the first of the ascending values that lies above a limit; their number when none does.
 * Cost: O(log n).
 */
export function firstAbove(ascending: ArrayLike<number>, limit: number): number {
	let low = 0;
	let high = ascending.length;
	while (low < high) {
		const middle = (low + high) >> 1;
		if (ascending[middle] > limit) high = middle;
		else low = middle + 1;
	}
	return low;
}
