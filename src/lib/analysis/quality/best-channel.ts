/** Mean waveform of a unit on the channels of its bundle. */
export interface Waveform {
	/** µV, row-major [channel][sample]. */
	readonly uv: Float64Array;
	readonly channels: number;
}

/** The channel on which a unit is largest. */
export interface BestChannel {
	readonly channel: number;
	/** Largest minus smallest value on it, µV. */
	readonly peakToPeakUv: number;
	/** Its samples, a view. */
	readonly uv: Float64Array;
}

/**
 * The channel with the largest swing from peak to trough, the lowest number in a tie. A channel with
 * a NaN sample is passed over.
 * @returns null when no channel has only finite samples
 * @throws RangeError the samples do not divide by the channels
 */
export function bestChannel({ uv, channels }: Waveform): BestChannel | null {
	const samples = uv.length / channels;
	if (!Number.isInteger(samples) || samples === 0) {
		throw new RangeError(`${uv.length} samples do not divide by ${channels} channels`);
	}
	let best: BestChannel | null = null;
	for (let channel = 0; channel < channels; channel++) {
		const row = uv.subarray(channel * samples, (channel + 1) * samples);
		let low = Infinity;
		let high = -Infinity;
		for (const value of row) {
			// NaN makes both NaN and stays.
			low = Math.min(low, value);
			high = Math.max(high, value);
		}
		const peakToPeakUv = high - low;
		if (Number.isFinite(peakToPeakUv) && !(best && best.peakToPeakUv >= peakToPeakUv)) {
			best = { channel, peakToPeakUv, uv: row };
		}
	}
	return best;
}
