/** Time windows to be decoded, in order of time. */
export interface Windows {
	readonly lengthS: number;
	readonly startS: Float64Array;
	/** Position sample at the middle of each window. */
	readonly sample: Int32Array;
}

/**
 * Windows side by side from the first sample of each stretch to its last; a window counts when the
 * sample that stands at its middle does.
 * @param stretch stretch of each sample, −1 for none
 * @param isUsed  1 for samples that count
 * @throws RangeError lengthS not above 0
 */
export function windowsOf(
	tS: Float64Array,
	standS: Float64Array,
	stretch: Int32Array,
	isUsed: Uint8Array,
	lengthS: number
): Windows {
	if (!(lengthS > 0)) throw new RangeError(`window length must be above 0 s, got ${lengthS}`);
	const starts: number[] = [];
	const samples: number[] = [];
	let first = 0;
	while (first < tS.length) {
		let last = first;
		while (last + 1 < tS.length && stretch[last + 1] === stretch[first]) last++;
		const count = stretch[first] < 0 ? 0 : Math.floor((tS[last] - tS[first]) / lengthS);
		let i = first;
		for (let k = 0; k < count; k++) {
			const middleS = tS[first] + (k + 0.5) * lengthS;
			while (i < last && tS[i + 1] <= middleS) i++;
			if (!isUsed[i] || !(middleS - tS[i] < standS[i])) continue;
			starts.push(tS[first] + k * lengthS);
			samples.push(i);
		}
		first = last + 1;
	}
	return { lengthS, startS: Float64Array.from(starts), sample: Int32Array.from(samples) };
}
