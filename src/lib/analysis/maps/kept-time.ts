/** The time that counts, closed up to one axis and cut into equal cells. */
export interface KeptTime {
	readonly lengthS: number;
	readonly cellS: number;
	readonly cells: number;
	/** Bin of every cell, twice in a row, so that a shifted cell needs no remainder. */
	readonly binTwice: Uint16Array | Int32Array;
	/** Where each sample begins on the axis, s. */
	readonly startS: Float64Array;
}

/**
 * Closes up the samples that count and reads their bins off at equal steps, at cell centres.
 * @param wantedCellS the step is the whole fraction of the kept time nearest to it
 * @returns cells = 0 when nothing counts
 */
export function keptTime(
	bin: Int32Array,
	standS: Float64Array,
	isUsed: Uint8Array,
	wantedCellS: number
): KeptTime {
	const startS = new Float64Array(bin.length);
	let lengthS = 0;
	for (let i = 0; i < bin.length; i++) {
		startS[i] = lengthS;
		if (isUsed[i]) lengthS += standS[i];
	}
	const cells = Math.round(lengthS / wantedCellS);
	const cellS = cells > 0 ? lengthS / cells : NaN;
	const most = bin.reduce((top, k) => Math.max(top, k), 0);
	const binTwice = most < 65_536 ? new Uint16Array(2 * cells) : new Int32Array(2 * cells);
	let i = 0;
	for (let cell = 0; cell < cells; cell++) {
		const middleS = (cell + 0.5) * cellS;
		while (i + 1 < bin.length && (!isUsed[i] || startS[i] + standS[i] <= middleS)) i++;
		binTwice[cell] = bin[i];
		binTwice[cell + cells] = bin[i];
	}
	return { lengthS, cellS, cells, binTwice, startS };
}

/**
 * Cell of every spike that counts, in the order given.
 * @param samples position sample of each spike, −1 for none
 */
export function spikeCells(
	kept: KeptTime,
	spikeS: Float64Array,
	samples: Int32Array,
	tS: Float64Array,
	isUsed: Uint8Array
): Int32Array {
	const out = new Int32Array(samples.length);
	let used = 0;
	for (let k = 0; k < samples.length; k++) {
		const i = samples[k];
		if (i < 0 || !isUsed[i]) continue;
		const at = Math.floor((kept.startS[i] + spikeS[k] - tS[i]) / kept.cellS);
		out[used++] = Math.min(kept.cells - 1, at);
	}
	return out.subarray(0, used);
}
