import { bestChannel, type Waveform } from './best-channel';

/** Several definitions go round; the name is stored with the number. */
export const SIGNAL_TO_NOISE = 'peak-to-peak of mean waveform / 2 MAD noise sd';

/** Size of a unit against the noise of its best channel. */
export interface SignalToNoise {
	readonly definition: typeof SIGNAL_TO_NOISE;
	/** −1 when no channel has a waveform. */
	readonly channel: number;
	readonly peakToPeakUv: number;
	readonly ratio: number;
}

/**
 * (max − min of the mean waveform on its best channel) / (2 σ of that channel's noise).
 * @param noiseSdUv σ of each channel, µV, from unit-free signal (see `robustSd`)
 * @returns ratio is NaN where σ is 0, NaN or the waveform is missing
 * @throws RangeError not one σ for each channel
 */
export function signalToNoise(waveform: Waveform, noiseSdUv: Float64Array): SignalToNoise {
	if (noiseSdUv.length !== waveform.channels) {
		throw new RangeError(`${waveform.channels} channels but ${noiseSdUv.length} noise figures`);
	}
	const best = bestChannel(waveform);
	const definition = SIGNAL_TO_NOISE;
	if (!best) return { definition, channel: -1, peakToPeakUv: NaN, ratio: NaN };
	const { channel, peakToPeakUv } = best;
	const sdUv = noiseSdUv[channel];
	return { definition, channel, peakToPeakUv, ratio: sdUv > 0 ? peakToPeakUv / (2 * sdUv) : NaN };
}
