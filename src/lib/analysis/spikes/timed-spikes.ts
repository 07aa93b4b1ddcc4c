/** Spikes of many units on one list, as recorders write them: times ascend. */
export interface TimedSpikes {
	readonly timeS: Float64Array;
	/** Unit of each spike, 0 … units − 1. */
	readonly unit: Uint16Array;
	readonly units: number;
}

/** Index of the first time that is not below a limit. @param timeS ascending */
export function firstFrom(timeS: Float64Array, limitS: number): number {
	let low = 0;
	let high = timeS.length;
	while (low < high) {
		const middle = (low + high) >>> 1;
		if (timeS[middle] < limitS) low = middle + 1;
		else high = middle;
	}
	return low;
}
