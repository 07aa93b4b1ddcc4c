/** Pairs of one range of stated probability. */
export interface ReliabilityBin {
	readonly from: number;
	readonly count: number;
	readonly meanProbability: number;
	/** Share that were one cell. */
	readonly share: number;
}

/** Reliability curve: what was stated against what was true, in ten equal ranges of probability. */
export function reliability(
	probabilities: ArrayLike<number>,
	isTrue: ArrayLike<number | boolean>
): ReliabilityBin[] {
	return Array.from({ length: 10 }, (_, bin) => {
		let count = 0;
		let stated = 0;
		let right = 0;
		for (let k = 0; k < probabilities.length; k++) {
			if (Math.min(9, Math.floor(probabilities[k] * 10)) !== bin) continue;
			count++;
			stated += probabilities[k];
			right += Number(isTrue[k]);
		}
		return { from: bin / 10, count, meanProbability: stated / count, share: right / count };
	});
}
